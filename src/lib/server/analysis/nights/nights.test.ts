import { describe, expect, it } from 'vitest';
import type { UnitNature } from '$lib/model/unit';
import { analyseCircuit } from '../analyse-circuit';
import { inventedInput, inventedLog, type InventedRun, type Shape } from '../testing/synthetic-log';
import { nightsOf, restingOffsets } from './nights';

// Invented nights; every expected value is worked by hand from the shapes.
const HOUR = 3600;
const DAY = 24 * HOUR;
const runs: InventedRun[] = Array.from({ length: 8 }, (_, i) => ({
	start: i * DAY + 8 * HOUR,
	stop: i * DAY + 18 * HOUR
}));
/** Seconds since the last stop (18:00), also before the first run. */
const off = (t: number) => ((t % DAY) + DAY - 18 * HOUR) % DAY;
const resting = (on: number, decay: (sinceStop: number, day: number) => number): Shape => {
	return (t, s) => (Number.isNaN(s) ? decay(off(t), Math.floor((t - 18 * HOUR) / DAY)) : on);
};
const nightShapes: Record<string, Shape> = {
	oilTemp: resting(50, (s) => 32 + 18 * Math.exp(-s / (2 * HOUR))),
	condSaturation: resting(38, (s) => 22 + 16 * Math.exp(-s / 600)),
	evapSaturation: resting(5, () => 18),
	evapWaterOut: resting(7, () => 18.5),
	evapWaterIn: resting(12, () => 18.6),
	condWaterIn: resting(28, () => 21.5),
	evapPumpRun: () => 1,
	condPumpRun: () => 1
};

function nights(change: Record<string, Shape> = {}, nature: UnitNature = {}) {
	const input = inventedInput(inventedLog(runs, 60, 0, 8 * DAY, { ...nightShapes, ...change }), { nature });
	const result = nightsOf(input, analyseCircuit(input).starts);
	const test = (key: string) => result.tests.find((t) => t.key === key);
	return { result, test };
}

describe('nightsOf', () => {
	it('passes a sound unit and gives its figures', () => {
		const { result, test } = nights();
		// Eight stops; the last rest runs to the log's end at midnight, six hours.
		expect(result.rests).toHaveLength(8);
		expect(result.rests[0]?.startAt).toBe(result.rests[0]?.to);
		expect(result.rests[7]?.startAt).toBeNull();
		// Oil settles at 32, the room (condensing) at 22.
		expect(test('oil-heater')).toMatchObject({ result: 'passed', rests: 8 });
		expect(test('oil-heater')?.value).toBeCloseTo(10, 0);
		expect(test('entering-leaving-offset')?.value).toBeCloseTo(0.1, 6);
		expect(test('saturation-leaving-offset')).toMatchObject({ result: 'passed' });
		expect(test('saturation-leaving-offset')?.value).toBeCloseTo(-0.5, 6);
		expect(test('non-condensables')?.result).toBe('passed');
		expect(test('oil-lift')).toMatchObject({ result: 'passed' });
		expect(test('suction-saturation-offset')).toMatchObject({ result: 'not-testable', value: null });
	});

	it('suspects the heater when oil goes to ambient', () => {
		const { test } = nights({ oilTemp: resting(50, (s) => 22 + 28 * Math.exp(-s / (2 * HOUR))) });
		expect(test('oil-heater')?.result).toBe('failed');
	});

	it('finds a saturation that rests off the water, and only with the pump proved', () => {
		const low = { evapSaturation: resting(5, () => 14.5) };
		const found = nights(low);
		expect(found.test('saturation-leaving-offset')).toMatchObject({ result: 'failed' });
		expect(restingOffsets(found.result).find((o) => o.key === 'saturation-leaving-offset')?.value).toBeCloseTo(-4, 6);
		expect(nights({ ...low, evapPumpRun: () => 0 }).test('saturation-leaving-offset')).toMatchObject({
			result: 'not-testable',
			sentence: 'The pump was off.'
		});
		expect(nights(low, { pumpDownOnStop: true }).test('saturation-leaving-offset')?.result).toBe('not-testable');
	});

	it('finds condensing saturation above the water', () => {
		const { test } = nights({ condSaturation: resting(38, (s) => 26 + 12 * Math.exp(-s / 600)) });
		expect(test('non-condensables')).toMatchObject({ result: 'failed' });
		expect(test('non-condensables')?.value).toBeCloseTo(4.5, 3);
	});

	it('sees pressures equalise faster than they used to', () => {
		// Lift from 33 K to half of it: 20·e^(−s/5000) = 16.5 at 962 s; from day 6 on ten times as fast.
		const { result } = nights({
			condSaturation: resting(38, (s, day) => 18 + 20 * Math.exp(-s / (day >= 6 ? 500 : 5000)))
		});
		const half = result.rests.map((rest) => rest.results.find((r) => r.key === 'equalising'));
		expect(half[5]?.result).toBe('passed');
		expect(half[5]?.value).toBe(1020);
		expect(half[6]).toMatchObject({ result: 'failed', value: 120 });
	});
});
