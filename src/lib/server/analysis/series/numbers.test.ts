import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { median, medianDeviation, quantile, sampledQuantile, theilSen } from './numbers';

describe('quantile and median', () => {
	// Worked by hand: type 7 of 1, 2, 3, 4 at 0.25 is 1.75.
	it('interpolates between order statistics and leaves NaN out', () => {
		expect(quantile([4, NaN, 1, 3, 2], 0.25)).toBe(1.75);
		expect(median([5, 1, NaN, 3])).toBe(3);
		expect(median([])).toBeNull();
		expect(medianDeviation([1, 2, 3, 4, 100])).toBe(1);
		expect(
			sampledQuantile(
				Float64Array.from({ length: 100_001 }, (_, i) => i),
				0.5
			)
		).toBeCloseTo(50_000, -2);
	});
});

describe('selection', () => {
	it('agrees with a sort', () => {
		const values = fc.array(fc.integer({ min: -20, max: 20 }), { minLength: 1, maxLength: 60 });
		fc.assert(
			fc.property(values, fc.double({ min: 0, max: 1, noNaN: true }), (list, q) => {
				const sorted = Float64Array.from(list).sort();
				const place = (sorted.length - 1) * q;
				const low = sorted[Math.floor(place)] ?? NaN;
				const high = sorted[Math.ceil(place)] ?? NaN;
				expect(quantile(list, q)).toBeCloseTo(low + (high - low) * (place - Math.floor(place)), 9);
			})
		);
	});
});

describe('theilSen', () => {
	// Source: Sen 1968's example as in the statistics worked examples: slope 4.0.
	it('gives the published slope', () => {
		expect(theilSen([1, 2, 3, 4, 10, 12, 18], [9, 15, 19, 20, 45, 55, 78])).toBeCloseTo(4, 9);
	});

	it('shrugs an outlier off, and needs two distinct x', () => {
		expect(theilSen([0, 1, 2, 3, 4, 5, 6], [0, 2, 4, 6, 8, 10, 900])).toBe(2);
		expect(theilSen([3, 3], [1, 2])).toBeNull();
		const x = Float64Array.from({ length: 1000 }, (_, i) => i);
		expect(
			theilSen(
				x,
				x.map((v) => 3 * v)
			)
		).toBeCloseTo(3, 9);
	});
});
