import { expect, it } from 'vitest';
import { hashToken, randomToken } from './tokens';

it('hashes as SHA-256 (FIPS 180-2 example: "abc")', () => {
	expect(hashToken('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
});

it('makes tokens of 256 bits that do not repeat', () => {
	const tokens = new Set(Array.from({ length: 100 }, randomToken));
	expect(tokens.size).toBe(100);
	for (const token of tokens) expect(token).toHaveLength(43);
});
