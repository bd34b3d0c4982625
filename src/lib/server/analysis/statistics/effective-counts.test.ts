import { expect, it } from 'vitest';
import { dependence, lagOneCorrelation } from './effective-counts';

it('works out lag 1 (by hand: 1 2 3 4 5 has Σ products 4 over Σ squares 10)', () => {
	expect(lagOneCorrelation([1, 2, 3, 4, 5])).toBeCloseTo(0.4, 12);
	expect(lagOneCorrelation([1, 1, 1])).toBeNull();
	expect(lagOneCorrelation([1, 0])).toBeNull();
});

it('shrinks by n/(n + 10) and turns ρ into d (by hand)', () => {
	const { rho, d } = dependence([1, 2, 3, 4, 5]);
	expect(rho).toBeCloseTo(0.4 * (5 / 15), 12);
	expect(d).toBeCloseTo((1 + rho) / (1 - rho), 12);
});

it('never makes independent or alternating days count more than they are', () => {
	expect(dependence([0, 1, 0, 1, 0, 1]).d).toBe(1);
	expect(dependence([]).d).toBe(1);
});
