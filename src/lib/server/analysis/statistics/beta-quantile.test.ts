import { expect, it } from 'vitest';
import { betaQuantile } from './beta-quantile';

it('agrees with Beta(1, 1) and with Clopper–Pearson of 0 of 10: 1 − 0.025^(1/10) (by hand)', () => {
	expect(betaQuantile(0.3, 1, 1)).toBeCloseTo(0.3, 11);
	expect(betaQuantile(0.975, 1, 10)).toBeCloseTo(1 - 0.025 ** 0.1, 11);
	expect(() => betaQuantile(1.5, 1, 1)).toThrow(RangeError);
});
