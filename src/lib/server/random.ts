import { generateIdFromEntropySize } from 'lucia';
import { randomBytes } from 'node:crypto';

/** The only source of randomness; tests may hand in a seeded one. */
export interface Random {
	/** A record id: 16 lower-case base-32 characters, 80 bits. */
	id(): string;
	/** An unguessable token: 32 bytes, base64url. */
	token(): string;
	/** From 0 (inclusive) to 1 (exclusive). */
	fraction(): number;
}

export const systemRandom: Random = {
	id: () => generateIdFromEntropySize(10),
	token: () => randomBytes(32).toString('base64url'),
	fraction: () => randomBytes(4).readUInt32BE() / 2 ** 32
};
