import { describe, expect, it } from 'vitest';
import type { Series } from '$lib/model/series';
import { ratedCurrent, readRunning } from './running';

const series = (v: number[], more: Partial<Series> = {}): Series => {
	return { t: Float64Array.from(v, (_, i) => i * 5000), v: Float64Array.from(v), logging: 'interval', ...more };
};
const on = (map: Parameters<typeof readRunning>[0]) => Array.from(readRunning(map, {})?.on ?? []);

describe('readRunning', () => {
	it('reads its own column and skips blanks', () => {
		const found = readRunning({ running: series([0, NaN, 1, 1, NaN, 0]) }, {});
		expect(Array.from(found?.t ?? [])).toEqual([0, 10_000, 15_000, 25_000]);
		expect(Array.from(found?.on ?? [])).toEqual([0, 1, 1, 0]);
		expect(found?.notes).toEqual([]);
	});

	it('lets current veto two readings or more, not one', () => {
		const t = series([0, 1, 1, 1, 1, 1, 1, 1, 1, 0]);
		const amps = { ...series([0, 90, 90, 2, 90, 90, 1, 1, 90, 0], { measure: 'pctRated' }), t: t.t };
		expect(on({ running: t, motorCurrent: amps })).toEqual([0, 1, 1, 1, 1, 1, 0, 0, 1, 0]);
	});

	it('believes the status where the current column is dead', () => {
		const t = series([0, 1, 1, 1, 1, 0]);
		const dead = { ...series([0, 0, 0, 0, 0, 0], { measure: 'pctRated' }), t: t.t };
		expect(on({ running: t, motorCurrent: dead })).toEqual([0, 1, 1, 1, 1, 0]);
		expect(readRunning({ running: t, motorCurrent: dead }, {})?.notes).toHaveLength(1);
	});

	it('falls back on current, power, speed, capacity, command, in this order', () => {
		expect(readRunning({ motorCurrent: series([0, 80, 100]), power: series([5, 5, 5]) }, {})?.source).toBe(
			'motorCurrent'
		);
		expect(on({ motorCurrent: series([2, 80, 100]) })).toEqual([0, 1, 1]);
		expect(readRunning({ power: series([1, 90, 100]) }, {})?.source).toBe('power');
		expect(on({ speed: series([0, 30, 50]) })).toEqual([0, 1, 1]);
		expect(on({ capacity: series([5, 5, 45, 60]) })).toEqual([0, 0, 1, 1]);
		expect(readRunning({ startCommand: series([0, 1]) }, {})?.source).toBe('startCommand');
		expect(readRunning({ evapWaterOut: series([7, 7]) }, {})).toBeNull();
	});
});

describe('ratedCurrent', () => {
	it('is 100 for a column in % of rated, the unit field, else the 95th percentile of the running amps', () => {
		const amps = series(Array.from({ length: 101 }, (_, i) => i));
		expect(ratedCurrent({ ...amps, measure: 'pctRated' }, { ratedAmps: 240 }, undefined)).toBe(100);
		expect(ratedCurrent(amps, { ratedAmps: 240 }, undefined)).toBe(240);
		// Running amps are 1…100: the 95th percentile of them is 95.05.
		expect(ratedCurrent(amps, {}, undefined)).toBeCloseTo(95.05, 9);
		expect(ratedCurrent(series([0, 0]), {}, undefined)).toBeNull();
	});
});
