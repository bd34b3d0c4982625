import { describe, expect, it } from 'vitest';
import type { Stroke } from '$lib/model/wire/views';
import { nearest, nextSpot, spotsOf } from './day-keys';
import type { DayRow } from './day-layout';

// Invented runs: two on the first day, none on the second, two on the third.
const stroke = (startId: string, from: number, to: number, beganBefore = false): Stroke => ({
	startId,
	circuit: '1',
	from,
	to,
	beganBefore,
	goesOn: false,
	outcome: 'held',
	startupTrip: false,
	attended: false
});
const row = (...strokes: Stroke[]): DayRow => ({
	kind: 'day',
	y: 0,
	height: 14,
	weekBegins: false,
	day: {
		date: '2026-05-08',
		strokes,
		logged: [],
		first: null,
		starts: 0,
		trips: 0,
		condWaterInAtStart: null,
		minEvapSaturation: null,
		belowCutout: false
	}
});
const spots = spotsOf([
	row(stroke('b', 700, 1000), stroke('a', 400, 410)),
	row(),
	row(stroke('old', 0, 30, true), stroke('c', 390, 500), stroke('d', 720, 900))
]);
const to = (at: string, key: string) => nextSpot(spots, at, key)?.stroke.startId ?? null;

describe('nextSpot', () => {
	it('reads by the clock, and leaves out what began yesterday', () => {
		expect(spots.map((spot) => spot.stroke.startId)).toEqual(['a', 'b', 'c', 'd']);
	});
	it('goes along time and to the nearest clock of the next day with runs', () => {
		expect(to('a', 'ArrowRight')).toBe('b');
		expect(to('b', 'ArrowDown')).toBe('d');
		expect(to('a', 'ArrowDown')).toBe('c');
		expect(to('d', 'ArrowUp')).toBe('b');
		expect(to('c', 'Home')).toBe('a');
		expect(to('a', 'End')).toBe('d');
	});
	it('stays where there is nothing further', () => {
		expect(to('a', 'ArrowLeft')).toBeNull();
		expect(to('d', 'ArrowDown')).toBeNull();
		expect(to('a', 'x')).toBeNull();
		expect(to('gone', 'ArrowRight')).toBeNull();
	});
});

describe('nearest', () => {
	it('takes the run that holds the minute, else the nearest end', () => {
		expect(nearest(spots, 800)?.stroke.startId).toBe('b');
		expect(nearest(spots.slice(0, 2), 500)?.stroke.startId).toBe('a');
		expect(nearest([], 5)).toBeNull();
	});
});
