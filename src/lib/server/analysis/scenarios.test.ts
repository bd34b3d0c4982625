import { describe, expect, it } from 'vitest';
import type { CircuitInput } from '$lib/model/circuit-input';
import type { EventRecord, Series, SeriesMap } from '$lib/model/series';
import { analyseCircuit } from './analyse-circuit';
import { inventedInput, inventedLog, MIDNIGHT, type InventedRun, type Shape } from './testing/synthetic-log';

// Invented logs of whole days; what must come out is worked by hand from the runs they are made of.
const HOUR = 3600;
const DAY = 24 * HOUR;
const at = (seconds: number) => MIDNIGHT + seconds * 1000;
const on =
	(value: number, off = 0): Shape =>
	(_, s) =>
		Number.isNaN(s) ? off : value;
const loaded = { capacity: on(80), evapWaterOut: () => 11, waterSetpoint: () => 6.5, evapSaturation: on(5, 12) };
const outcomes = (series: SeriesMap, more: Partial<CircuitInput> = {}) =>
	analyseCircuit(inventedInput(series, more)).starts.map((s) => s.outcome);
const event = (seconds: number, text = 'Low oil pressure trip'): EventRecord => {
	return { at: at(seconds), text, severity: 'trip', what: 'activation', source: 'history' };
};

describe('the end of a log', () => {
	const runs: InventedRun[] = [{ start: HOUR, stop: 99 * HOUR }];
	const ending = (seconds: number) => inventedLog(runs, 5, 0, HOUR + seconds, loaded);

	it('loses a start that cannot be told yet and holds one that outlived the window', () => {
		expect(outcomes(ending(1195))).toEqual(['lost']);
		expect(outcomes(ending(1200))).toEqual(['held']);
	});

	it('is a trip when an activation lies in its last spacing', () => {
		const { starts } = analyseCircuit(inventedInput(ending(300), { events: [event(HOUR + 302)] }));
		expect(starts[0]).toMatchObject({ outcome: 'tripped', startupTrip: true, endedAt: null });
		expect(starts[0]?.outcomeReason).toContain('log ends at the trip');
		expect(outcomes(ending(300), { events: [event(HOUR + 200)] })).toEqual(['lost']);
	});
});

describe('light-load cycling', () => {
	it('is called off, start after start, and never a trip', () => {
		const runs = Array.from({ length: 20 }, (_, i) => ({ start: HOUR + i * 1500, stop: HOUR + i * 1500 + 600 }));
		const evapWaterOut: Shape = (_, s) => (Number.isNaN(s) ? 8 : 9 - (s / 600) * 4.5);
		for (const spacing of [5, 60]) {
			const series = inventedLog(runs, spacing, 0, 12 * HOUR, { ...loaded, evapWaterOut });
			expect(new Set(outcomes(series))).toEqual(new Set(['called-off']));
		}
	});
});

describe('a supply that fails', () => {
	const runs: InventedRun[] = [{ start: HOUR, stop: HOUR + 900 }];
	const series = inventedLog(runs, 5, 0, 3 * HOUR, loaded);
	const other = inventedLog([{ start: 0.5 * HOUR, stop: HOUR + 900 }], 5, 0, 3 * HOUR).running;
	if (other === undefined) throw new Error('no running');
	const others = [{ name: 'B', sameUnit: false, running: other }];

	it('stops everything at once and is no trip', () => {
		expect(outcomes(series, { others })).toEqual(['lost']);
		expect(outcomes(series, { others, events: [event(HOUR + 900, 'Undervoltage')] })).toEqual(['lost']);
		expect(outcomes(series, { events: [event(HOUR + 900, 'Power failure')] })).toEqual(['lost']);
	});

	it('leaves the trip of one machine alone', () => {
		expect(outcomes(series, { events: [event(HOUR + 900, 'Undervoltage')] })).toEqual(['tripped']);
	});
});

describe('an alarm clock that is off', () => {
	const runs = Array.from({ length: 5 }, (_, i) => ({
		start: i * DAY + 6 * HOUR,
		stop: i * DAY + 6 * HOUR + 100 + 20 * i
	}));
	const events = runs.map((run) => event(run.stop + 600));
	const input = inventedInput(inventedLog(runs, 5, 0, 5 * DAY, loaded), { events });

	it('is set right by the shift that matches most, and says so', () => {
		const found = analyseCircuit(input);
		expect(found.proposedAlarmShift).toBe(-600);
		expect(found.starts.map((s) => s.outcome)).toEqual(Array(5).fill('tripped'));
		expect(found.starts[0]?.trip?.at).toBe(at(runs[0]?.stop ?? 0));
		expect(found.notes.join(' ')).toContain('600 s ahead');
	});

	it('stands as a person set it', () => {
		expect(analyseCircuit({ ...input, alarmShiftSeconds: 0 }).starts[0]?.outcome).not.toBe('tripped');
		expect(analyseCircuit({ ...input, alarmShiftSeconds: -600 }).starts[0]?.outcome).toBe('tripped');
	});
});

describe('the same day in other forms', () => {
	const runs: InventedRun[] = [
		{ start: 6 * HOUR, stop: 6 * HOUR + 120 },
		{ start: 7 * HOUR, stop: 12 * HOUR }
	];
	const shapes = {
		...loaded,
		motorCurrent: on(90),
		oilTemp: on(50, 35),
		condSaturation: on(36, 20),
		startCommand: (t: number) => (t >= 6 * HOUR - 60 && t < 12 * HOUR - 20 ? 1 : 0)
	};
	const events = [event(6 * HOUR + 121, 'Oil flow lost')];
	const series = inventedLog(runs, 5, 0, DAY, shapes);
	const plain = (map: SeriesMap) =>
		analyseCircuit(inventedInput(map, { events, nature: { ratedAmps: 100 } })).starts.map((s) => [
			s.startedAt,
			s.endedAt,
			s.outcome,
			s.trip?.kind,
			s.figures.startCapacity,
			s.figures.settledMargin,
			s.figures.oilTempAtStart
		]);
	const expected = [
		[at(6 * HOUR), at(6 * HOUR + 120), 'tripped', 'oil-flow', 80, null, 35],
		[at(7 * HOUR), at(12 * HOUR), 'held', undefined, 80, 14, 35]
	];

	it('gives the same starts from interval rows', () => {
		expect(plain(series)).toEqual(expected);
	});

	it('gives the same from change-of-value records', () => {
		const change = (s: Series): Series => {
			// A record when the value moved, and for analogue values every 10 min.
			const kept = Array.from(s.t.keys()).filter((i) => i === 0 || s.v[i] !== s.v[i - 1] || (i * 5) % 600 === 0);
			return {
				t: Float64Array.from(kept, (i) => s.t[i] ?? NaN),
				v: Float64Array.from(kept, (i) => s.v[i] ?? NaN),
				logging: 'change'
			};
		};
		const map = Object.fromEntries(Object.entries(series).map(([id, s]) => [id, change(s)])) as SeriesMap;
		expect(plain(map)).toEqual(expected);
	});

	it('gives the same without a running column', () => {
		const { running: _, ...rest } = series;
		expect(plain(rest)).toEqual(expected);
	});

	it('gives the same with one cell in fifty blank, but for what the blanks touch', () => {
		let seed = 5;
		const blank = (s: Series): Series => {
			const v = s.v.map((x) => {
				seed = (seed * 16_807) % 2_147_483_647;
				return seed % 50 === 0 ? NaN : x;
			});
			return { ...s, v };
		};
		const map = Object.fromEntries(Object.entries(series).map(([id, s]) => [id, blank(s)])) as SeriesMap;
		const found = plain(map);
		expect(found.map((row) => row.slice(2, 7))).toEqual(expected.map((row) => row.slice(2, 7)));
		found.forEach((row, i) => expect(Math.abs(Number(row[0]) - Number(expected[i]?.[0]))).toBeLessThanOrEqual(10_000));
	});
});

describe('a healthy week', () => {
	it('has no trip and no stall, at any spacing', () => {
		const runs = Array.from({ length: 7 }, (_, i) => ({ start: i * DAY + 6 * HOUR, stop: i * DAY + 18 * HOUR }));
		const load: Shape = (t, s) => (Number.isNaN(s) ? 0 : Math.min(45 + s / 20, 70 + 15 * Math.sin(t / 5000)));
		for (const spacing of [5, 15, 60, 300]) {
			const series = inventedLog(runs, spacing, 0, 7 * DAY, {
				...loaded,
				capacity: load,
				demand: load,
				motorCurrent: on(70),
				condSaturation: on(36, 22),
				evapWaterOut: (_, s) => (Number.isNaN(s) ? 12 : 6.6 + 5 * Math.exp(-s / 600))
			});
			const { starts } = analyseCircuit(inventedInput(series, { nature: { ratedAmps: 100 } }));
			expect(starts.map((s) => s.outcome)).toEqual(Array(7).fill('held'));
			expect(starts.every((s) => s.trip === null && s.stall === null)).toBe(true);
		}
	});
});
