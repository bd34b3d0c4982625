import { expect, it } from 'vitest';
import { signFlip } from './sign-flip';

it('counts sign patterns (by hand: six equal days leave two of 64)', () => {
	expect(signFlip([1, 1, 1, 1, 1, 1])?.twoSided).toBe(2 / 64);
	// +1 +1 −1: |sum| = 1 is reached by all 8 patterns.
	expect(signFlip([1, 1, -1])?.twoSided).toBe(1);
});

it('draws beyond 18 days and gives the same answer for the same seed', () => {
	const days = Array.from({ length: 24 }, (_, i) => (i % 3 === 0 ? -1 : 1));
	const result = signFlip(days, 7);
	expect(result?.exact).toBe(false);
	// 16 plus and 8 minus of 24: two-sided binomial 0.1516 (by hand from C(24, k)).
	expect(result?.twoSided).toBeCloseTo(0.1516, 1.9);
	expect(signFlip(days, 7)).toEqual(result);
});

it('cannot be had without a day', () => {
	expect(signFlip([])).toBeNull();
});
