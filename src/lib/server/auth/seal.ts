import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';
import type { Config } from '../config';

const CIPHER = 'aes-256-gcm';
const IV_BYTES = 12;
const TAG_BYTES = 16;

/** A key of its own for sealing, derived from the application's secret (HKDF, RFC 5869). */
const sealingKey = (config: Pick<Config, 'linkSecret'>): Buffer =>
	Buffer.from(hkdfSync('sha256', config.linkSecret, 'fadewell', 'seal second factor', 32));

/** Encrypts a short text for storage. `boundTo` (such as the owner's id) has to be the same when it is opened. */
export function seal(config: Pick<Config, 'linkSecret'>, text: string, boundTo: string): string {
	const iv = randomBytes(IV_BYTES);
	const cipher = createCipheriv(CIPHER, sealingKey(config), iv).setAAD(Buffer.from(boundTo));
	const sealed = Buffer.concat([cipher.update(text, 'utf8'), cipher.final()]);
	return Buffer.concat([iv, cipher.getAuthTag(), sealed]).toString('base64url');
}

/** The sealed text; null where it was changed, sealed with another key, or bound to something else. */
export function unseal(config: Pick<Config, 'linkSecret'>, sealed: string, boundTo: string): string | null {
	const bytes = Buffer.from(sealed, 'base64url');
	if (bytes.length <= IV_BYTES + TAG_BYTES) return null;
	try {
		const decipher = createDecipheriv(CIPHER, sealingKey(config), bytes.subarray(0, IV_BYTES))
			.setAAD(Buffer.from(boundTo))
			.setAuthTag(bytes.subarray(IV_BYTES, IV_BYTES + TAG_BYTES));
		const opened = [decipher.update(bytes.subarray(IV_BYTES + TAG_BYTES)), decipher.final()];
		return Buffer.concat(opened).toString('utf8');
	} catch {
		// Authentication failed: by design the only thing that can be learnt.
		return null;
	}
}
