import { Secret, TOTP } from 'otpauth';
import { hashToken, randomToken } from './tokens';

/** Two-step sign-in: time-based one-time passwords (RFC 6238) and recovery codes. */

const PERIOD = 30;
const RECOVERY_CODES = 10;

const totpOf = (secret: string, email = ''): TOTP =>
	new TOTP({
		issuer: 'Firstpull',
		label: email,
		algorithm: 'SHA1',
		digits: 6,
		period: PERIOD,
		secret: Secret.fromBase32(secret)
	});

/** A new secret, base32, of 160 bits. */
export const newTotpSecret = (): string => new Secret({ size: 20 }).base32;

/** The address that an authenticator takes. */
export const totpAddress = (secret: string, email: string): string => totpOf(secret, email).toString();

/**
 * The time step of a code that fits now, one step either way; null when it does not, or when its step was used already
 * (a code works once).
 */
export function totpStep(secret: string, code: string, now: Date, lastStep: number | null): number | null {
	const plain = code.replaceAll(/\s/g, '');
	if (!/^\d{6}$/.test(plain)) return null;
	const delta = totpOf(secret).validate({ token: plain, timestamp: now.getTime(), window: 1 });
	if (delta === null) return null;
	const step = Math.floor(now.getTime() / 1000 / PERIOD) + delta;
	return lastStep !== null && step <= lastStep ? null : step;
}

/** Recovery codes: shown once, only their hashes are stored. */
export function newRecoveryCodes(): { codes: string[]; hashes: string[] } {
	const codes = Array.from({ length: RECOVERY_CODES }, () => {
		const plain = randomToken()
			.toLowerCase()
			.replaceAll(/[^a-z0-9]/g, '')
			.slice(0, 12);
		return `${plain.slice(0, 4)}-${plain.slice(4, 8)}-${plain.slice(8)}`;
	});
	return { codes, hashes: codes.map(recoveryHash) };
}

/** The hash a recovery code is known by, whatever its case and spaces. */
export const recoveryHash = (code: string): string => hashToken(code.trim().toLowerCase());
