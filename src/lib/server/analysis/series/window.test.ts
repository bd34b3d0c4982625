import { describe, expect, it } from 'vitest';
import type { Series } from '$lib/model/series';
import { extreme, hasReadings, lastReading, nearestReading, readingsWithin } from './window';

const series: Series = {
	t: Float64Array.of(0, 10_000, 20_000, 30_000, 40_000),
	v: Float64Array.of(5, NaN, 3, 3, 8),
	logging: 'interval'
};

describe('windows', () => {
	it('are inclusive on both sides and leave blanks out', () => {
		expect(Array.from(readingsWithin(series, 10_000, 40_000).v)).toEqual([3, 3, 8]);
		expect(Array.from(readingsWithin(series, 0, 0).v)).toEqual([5]);
		expect(readingsWithin(series, 50_000, 40_000).v).toHaveLength(0);
		expect(() => readingsWithin(series, NaN, 1)).toThrow(RangeError);
	});

	it('give the first of equal extremes', () => {
		expect(extreme(readingsWithin(series, 0, 40_000), 1)).toEqual({ value: 3, at: 20_000 });
		expect(extreme(readingsWithin(series, 0, 40_000), -1)).toEqual({ value: 8, at: 40_000 });
		expect(extreme({ t: new Float64Array(), v: new Float64Array() }, 1)).toBeNull();
	});

	it('find the nearest and the last reading within reach', () => {
		expect(nearestReading(series, 12_000, 10)).toEqual({ value: 3, at: 20_000 });
		expect(nearestReading(series, 10_000, 10)).toEqual({ value: 5, at: 0 });
		expect(nearestReading(series, 10_000, 5)).toBeNull();
		expect(lastReading(series, 15_000, 20)).toEqual({ value: 5, at: 0 });
		expect(lastReading(series, 15_000, 10)).toBeNull();
		expect(hasReadings({ ...series, v: series.v.map(() => NaN) })).toBe(false);
		expect(hasReadings(undefined)).toBe(false);
	});
});
