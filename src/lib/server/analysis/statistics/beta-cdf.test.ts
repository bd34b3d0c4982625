import { expect, it } from 'vitest';
import { betaCdf } from './beta-cdf';

it('agrees with the closed form for whole numbers: I_x(2, 3) = 6x² − 8x³ + 3x⁴ (by hand)', () => {
	for (const x of [0.05, 0.3, 0.5, 0.9]) expect(betaCdf(x, 2, 3)).toBeCloseTo(6 * x ** 2 - 8 * x ** 3 + 3 * x ** 4, 12);
});

it('agrees with the arcsine law: I_x(1/2, 1/2) = (2/π)·asin √x', () => {
	expect(betaCdf(0.2, 0.5, 0.5)).toBeCloseTo((2 / Math.PI) * Math.asin(Math.sqrt(0.2)), 12);
	expect(betaCdf(0, 1, 1)).toBe(0);
	expect(() => betaCdf(0.5, 0, 1)).toThrow(RangeError);
});
