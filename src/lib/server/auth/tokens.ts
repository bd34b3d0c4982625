import { encodeBase64urlNoPadding, encodeHexLowerCase } from '@oslojs/encoding';
import { sha256 } from '@oslojs/crypto/sha2';

/** A random secret of 256 bits, URL-safe. */
export function randomToken(): string {
	return encodeBase64urlNoPadding(crypto.getRandomValues(new Uint8Array(32)));
}

/** SHA-256 of a token as hex: what the store keeps. A token has 256 random bits, so no salt is needed. */
export function hashToken(token: string): string {
	return encodeHexLowerCase(sha256(new TextEncoder().encode(token)));
}
