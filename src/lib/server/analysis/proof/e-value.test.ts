import { expect, it } from 'vitest';
import { cleanStillNeeded, eThreshold, eValue } from './e-value';

// method.md, "Proof after a change": with k′/m′ = 3/4 and t = 0, E passes 20 at c = 4 and 40 at c = 6.
const before = { k: 3, m: 4 };

it('passes 20 at four clean and 40 at six', () => {
	expect(eValue(before, { t: 0, c: 3 })).toBeLessThan(20);
	expect(eValue(before, { t: 0, c: 4 })).toBeGreaterThanOrEqual(20);
	expect(eValue(before, { t: 0, c: 5 })).toBeLessThan(40);
	expect(eValue(before, { t: 0, c: 6 })).toBeGreaterThanOrEqual(40);
});

it('is one without an exposed start, and the first clean start is worth 0.95/0.3 (by hand)', () => {
	expect(eValue(before, { t: 0, c: 0 })).toBeCloseTo(1, 12);
	expect(eValue(before, { t: 0, c: 1 })).toBeCloseTo(0.95 / 0.3, 10);
	expect(eValue(before, { t: 1, c: 0 })).toBeCloseTo(0.05 / 0.7, 10);
});

it('asks more after each change of a case: 40, 120, 240', () => {
	expect([1, 2, 3].map(eThreshold).map((x) => Math.round(x))).toEqual([40, 120, 240]);
	expect(() => eThreshold(0)).toThrow(RangeError);
});

it('counts what is still needed, five clean at least', () => {
	expect(cleanStillNeeded(before, { t: 0, c: 0 }, 40)).toBe(6);
	expect(cleanStillNeeded({ k: 10, m: 10 }, { t: 0, c: 0 }, 40)).toBe(5);
	// One in ten before needs hundreds.
	expect(cleanStillNeeded({ k: 1, m: 10 }, { t: 0, c: 0 }, 40) ?? Infinity).toBeGreaterThan(100);
	expect(() => eValue({ k: 2, m: 1 }, { t: 0, c: 0 })).toThrow(RangeError);
});
