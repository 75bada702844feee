import { base32 } from 'oslo/encoding';
import { createTOTPKeyURI, generateHOTP } from 'oslo/otp';
import { timingSafeEqual } from 'node:crypto';
import type { Random } from '../random';

/** Time-based one-time codes (RFC 6238): 6 digits, 30 seconds. */
const STEP_MILLISECONDS = 30_000;
/** A code of the step before or after is accepted, for clocks that differ (RFC 6238, section 5.2). */
const STEPS_AROUND = [0, -1, 1] as const;

/** A new secret: 160 bits, base 32 without padding. */
export function newCodeSecret(random: Random): string {
	const bytes = Buffer.from(random.token(), 'base64url').subarray(0, 20);
	return base32.encode(new Uint8Array(bytes), { includePadding: false });
}

/** The address an authenticator app reads from the QR code. */
export const codeSecretUri = (secret: string, account: string): string =>
	createTOTPKeyURI('Fadewell', account, decode(secret));

const decode = (secret: string): Uint8Array => base32.decode(secret, { strict: false });

/**
 * The time step that the code belongs to, or null where it does not fit or its step is not later than the last one
 * accepted: each code is good once. The caller stores the step under the condition that it is still later.
 */
export async function acceptedStep(
	secret: string,
	code: string,
	at: { readonly now: Date; readonly lastStep: number | null }
): Promise<number | null> {
	const typed = code.replace(/\s/g, '');
	if (!/^\d{6}$/.test(typed)) return null;
	const current = Math.floor(at.now.getTime() / STEP_MILLISECONDS);
	for (const around of STEPS_AROUND) {
		const step = current + around;
		const expected = await generateHOTP(decode(secret), step);
		if (!timingSafeEqual(Buffer.from(expected), Buffer.from(typed))) continue;
		return at.lastStep === null || step > at.lastStep ? step : null;
	}
	return null;
}
