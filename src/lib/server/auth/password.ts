import { Argon2id } from 'oslo/password';

const argon = new Argon2id();

/** A hash nobody has the password of; made once per process, at the same cost as a real one. */
let nobody: Promise<string> | undefined;

export const hashPassword = (password: string): Promise<string> => argon.hash(password);

/**
 * Whether the password fits. Without a hash (no such account, or no password yet) the same work is done for
 * nothing, so that the time of the answer does not tell which accounts exist.
 */
export async function verifyPassword(hash: string | null, password: string): Promise<boolean> {
	if (hash !== null) return argon.verify(hash, password);
	nobody ??= argon.hash('nobody signs in with this');
	await argon.verify(await nobody, password);
	return false;
}
