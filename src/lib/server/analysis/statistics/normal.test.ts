import { expect, it } from 'vitest';
import { normalCdf, normalQuantile } from './normal';

it('agrees with Abramowitz & Stegun table 26.1', () => {
	expect(normalCdf(0)).toBe(0.5);
	expect(normalCdf(1)).toBeCloseTo(0.841344746068543, 13);
	expect(normalCdf(2)).toBeCloseTo(0.977249868051821, 13);
	expect(normalCdf(-4)).toBeCloseTo(3.167124183311998e-5, 15);
});

it('turns back: 0.975 is 1.959964 (table 26.5)', () => {
	expect(normalQuantile(0.975)).toBeCloseTo(1.959963984540054, 10);
	expect(normalQuantile(0.001)).toBeCloseTo(-3.090232306167813, 9);
	expect(() => normalQuantile(1)).toThrow(RangeError);
});
