import { describe, expect, it } from 'vitest';
import { analyseCircuit } from '../analyse-circuit';
import { inventedInput, inventedLog, MIDNIGHT, type InventedRun } from '../testing/synthetic-log';
import { bandOf, departureOf, elapsedValues } from './bands';
import { firstMoverOf, matchedHeld } from './first-mover';

describe('bandOf and departureOf', () => {
	// Worked by hand: at each instant the five values are 8, 9, 10, 11, 12; median 10, MAD 1.
	const rows = [8, 9, 10, 11, 12].map((v) => [v, v, v, v]);

	it('is median ± 3 MAD, or the floor where that is wider', () => {
		expect(bandOf('capacity', rows, [0, 5, 10, 15], 1)).toMatchObject({ low: [7, 7, 7, 7], high: [13, 13, 13, 13] });
		expect(bandOf('capacity', rows, [0, 5, 10, 15], 4).high[0]).toBe(14);
		expect(bandOf('capacity', rows.slice(1), [0, 5, 10, 15], 1).low[0]).toBeNaN();
	});

	it('departs at the first of two samples outside on one side, dated back by the lag', () => {
		const band = bandOf('capacity', rows, [0, 5, 10, 15], 1);
		const lag = { seconds: 2, error: 1 };
		expect(departureOf(band, [10, 20, 10, 20], 5, lag)).toBeNull();
		expect(departureOf(band, [10, 20, 1, 1], 5, lag)).toMatchObject({
			atSeconds: 8,
			direction: 'below',
			errorSeconds: 6
		});
		expect(departureOf(band, [10, 20, NaN, 20], 5, lag)).toMatchObject({ atSeconds: 3, direction: 'above' });
	});

	it('reads no value past the stop or where nothing is fresh', () => {
		const t = Float64Array.of(0, 5000, 10_000, 15_000, 60_000);
		const series = { t, v: Float64Array.of(1, 2, 3, 4, 5), logging: 'interval' as const };
		expect(elapsedValues(series, 0, 15_000, [0, 5, 30, 20])).toEqual([1, 2, NaN, NaN]);
	});
});

describe('firstMoverOf', () => {
	// Invented: six daily runs that hold; a seventh loads 15 points higher from 30 s and dives from 80 s; stops at 160 s.
	const DAY = 86_400;
	const runs: InventedRun[] = Array.from({ length: 6 }, (_, i) => ({
		start: i * DAY + 8 * 3600,
		stop: i * DAY + 10 * 3600
	}));
	const bad = { start: 6 * DAY + 8 * 3600, stop: 6 * DAY + 8 * 3600 + 160 };
	const isBad = (t: number) => t >= bad.start;
	const series = inventedLog([...runs, bad], 5, 0, 7 * DAY, {
		capacity: (t, s) => (Number.isNaN(s) ? 0 : 45 + (isBad(t) && s >= 30 ? 15 : 0)),
		evapSaturation: (t, s) => (Number.isNaN(s) ? 12 : 8 - (isBad(t) && s >= 80 ? (s - 80) / 10 : 0)),
		evapWaterOut: () => 12
	});
	const input = inventedInput(series, {
		events: [
			{ at: MIDNIGHT + bad.stop * 1000, text: 'low evap temp', severity: 'trip', what: 'activation', source: 'history' }
		]
	});
	const { starts } = analyseCircuit(input);
	const start = starts[6];
	if (start === undefined) throw new Error('seven starts expected');

	it('puts the capacity before the saturation, each with its error', () => {
		const held = matchedHeld(start, starts);
		expect(held).toHaveLength(6);
		const found = firstMoverOf(input, start, held);
		// Capacity out at 30 s. Saturation 0.5 K under from 85 s on; strictly under 7.5 from 90 s.
		expect(found.departures.map((d) => [d.signal, d.atSeconds, d.direction])).toEqual([
			['capacity', 30, 'above'],
			['evapSaturation', 90, 'below']
		]);
		expect(found.departures[0]?.errorSeconds).toBe(5);
		expect(found.cannotTell).toBeNull();
		expect(found.tripAtSeconds).toBe(160);
		expect(found.sentence).toContain('capacity above at 30 ± 5 s');
	});

	it('says when the held starts are too few', () => {
		const found = firstMoverOf(input, start, starts.slice(0, 3));
		expect(found.departures).toEqual([]);
		expect(found.cannotTell).toContain('5 are needed');
	});

	it('finds nothing out of the band in a held start', () => {
		const held = starts[0];
		if (held === undefined) throw new Error('a start expected');
		expect(firstMoverOf(input, held, matchedHeld(held, starts)).departures).toEqual([]);
	});
});
