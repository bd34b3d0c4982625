import { describe, expect, it } from 'vitest';
import type { Pin, Stroke } from '$lib/model/wire/views';
import { layDays, runsBefore, wideHour, type Day } from './day-layout';

// Invented days.
const stroke = (from: number): Stroke => ({
	startId: String(from),
	circuit: '1',
	from,
	to: from + 60,
	beganBefore: false,
	goesOn: false,
	outcome: 'held',
	startupTrip: false,
	attended: false
});
const day = (date: string, ...from: number[]): Day => ({
	date,
	strokes: from.map(stroke),
	logged: [[0, 1440]],
	first: null,
	starts: from.length,
	trips: 0,
	condWaterInAtStart: null,
	minEvapSaturation: null,
	belowCutout: false
});
const pin: Pin = { kind: 'change', id: 'p', at: '2026-05-09T10:00:00Z', date: '2026-05-09', clock: '12:00', text: 'x' };
// 2026-05-09 is a Saturday.
const days = [day('2026-05-08', 400), day('2026-05-09'), day('2026-05-10'), day('2026-05-11', 410)];
const options = { row: 14, idleRow: 10, weekGap: 7, pin: 17, newestFirst: false };

describe('layDays', () => {
	it('puts a pin below its day and paper before Monday', () => {
		const { rows, height } = layDays(days, [pin], options);
		expect(rows.map((row) => [row.kind, row.y])).toEqual([
			['day', 0],
			['day', 14],
			['pin', 24],
			['day', 41],
			['day', 58]
		]);
		expect(height).toBe(72);
	});
	it('begins with today where it should, the pin above its day', () => {
		const { rows } = layDays(days, [pin], { ...options, newestFirst: true });
		expect(rows.map((row) => (row.kind === 'day' ? row.day.date.slice(8) : 'pin'))).toEqual([
			'11',
			'10',
			'pin',
			'09',
			'08'
		]);
	});
});

describe('wideHour', () => {
	it('lies around the trips', () => {
		const cluster = { from: 300, to: 350, inside: 3, trips: 3, otherTrips: 0, others: 2 };
		expect(wideHour({ days, cluster })).toEqual({ from: 285, to: 360 });
	});
	it('lies where the first runs of the days begin', () => {
		expect(wideHour({ days, cluster: null })).toEqual({ from: 390, to: 450 });
	});
	it('stays inside the day', () => {
		expect(wideHour({ days: [day('2026-05-08', 1430)], cluster: null })).toEqual({ from: 1380, to: 1440 });
	});
});

describe('runsBefore', () => {
	it('looks at every run', () => {
		expect(runsBefore(days, 405)).toBe(true);
		expect(runsBefore(days, 390)).toBe(false);
	});
});
