import { describe, expect, it } from 'vitest';
import { newRecoveryCodes, newTotpSecret, recoveryHash, totpAddress, totpStep } from './two-step';

describe('totpStep', () => {
	// RFC 6238, appendix B: secret "12345678901234567890", SHA-1; at 59 s the eight digits are 94287082, the last six 287082;
	// at 1111111109 s 07081804.
	const secret = 'GEZDGNBVGY3TQOJQGEZDGNBVGY3TQOJQ';

	it('takes the codes of RFC 6238', () => {
		expect(totpStep(secret, '287082', new Date(59_000), null)).toBe(1);
		expect(totpStep(secret, '081 804', new Date(1_111_111_109_000), null)).toBe(37_037_036);
	});

	it('takes a code once, a step early or late, and no other', () => {
		expect(totpStep(secret, '287082', new Date(59_000), 1)).toBeNull();
		expect(totpStep(secret, '287082', new Date(89_000), null)).toBe(1);
		expect(totpStep(secret, '287082', new Date(125_000), null)).toBeNull();
		expect(totpStep(secret, '287083', new Date(59_000), null)).toBeNull();
		expect(totpStep(secret, 'words', new Date(59_000), null)).toBeNull();
	});
});

describe('secrets', () => {
	it('have 160 bits, and an address an authenticator takes', () => {
		const secret = newTotpSecret();
		expect(secret).toMatch(/^[A-Z2-7]{32}$/);
		expect(totpAddress(secret, 'a@b.test')).toMatch(/^otpauth:\/\/totp\/Firstpull:a%40b\.test\?/);
	});

	it('come with ten different recovery codes that are stored as hashes', () => {
		const { codes, hashes } = newRecoveryCodes();
		expect(new Set(codes).size).toBe(10);
		expect(codes[0]).toMatch(/^[a-z0-9]{4}-[a-z0-9]{4}-[a-z0-9]{4}$/);
		expect(recoveryHash(` ${codes[0]?.toUpperCase() ?? ''} `)).toBe(hashes[0]);
		expect(JSON.stringify(hashes)).not.toContain(codes[0]);
	});
});
