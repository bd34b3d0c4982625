import { describe, expect, it } from 'vitest';
import type { NotedStartBody } from '$lib/model/noted';
import type { EventRecord } from '$lib/model/series';
import { DEFAULT_LIMITS } from '$lib/model/unit';
import { notedStarts, type NotedInput } from './noted-starts';

/** Invented: a Tuesday, minutes from 06:00 UTC. */
const at = (minutes: number): number => Date.UTC(2025, 2, 4, 6) + minutes * 60_000;
const line = (minutes: number, text: string, more: Partial<EventRecord> = {}): EventRecord => ({
	at: at(minutes),
	text,
	severity: 'unknown',
	what: 'activation',
	source: 'history',
	...more
});
const typed = (from: number | null, to: number | null, more: Partial<NotedStartBody> = {}): NotedStartBody => ({
	kind: 'start',
	startedAt: from === null ? null : at(from),
	endedAt: to === null ? null : at(to),
	outcome: 'tripped',
	tripKind: null,
	text: '',
	attended: false,
	readings: [],
	note: '',
	...more
});
const record = (more: Partial<NotedInput>) =>
	notedStarts({
		circuit: '1',
		typed: [],
		events: [],
		tripWords: [],
		covered: [],
		visits: [],
		limits: DEFAULT_LIMITS,
		...more
	});

describe('a record from an alarm list', () => {
	it('has a trip for each stop, its start not known, and no figure', () => {
		const [first, second, ...rest] = record({
			events: [line(0, 'Low oil flow'), line(1, 'Compressor lockout'), line(90, 'High condenser pressure')]
		});
		expect(rest).toEqual([]);
		expect(first).toMatchObject({ source: 'alarm-list', outcome: 'tripped', startedAt: at(0), startupTrip: false });
		expect(first?.trip).toMatchObject({ kind: 'oil-flow', basis: 'recorded', text: 'Low oil flow' });
		expect(first?.notes.join()).toMatch(/start.* not known/);
		expect(second?.trip?.kind).toBe('high-condensing');
		expect(Object.values(second?.figures ?? {}).every((value) => value === null)).toBe(true);
	});

	it('leaves out warnings, clearings, power failures and what names another circuit', () => {
		const events = [
			line(0, 'Low oil flow', { severity: 'warning' }),
			line(5, 'Low oil flow', { what: 'clearing' }),
			line(9, 'Power failure'),
			line(12, 'Circuit 2 low oil flow')
		];
		expect(record({ events })).toEqual([]);
	});

	it('takes start and stop lines, and tells held, tripped and unclear apart', () => {
		const starts = record({
			events: [
				line(0, 'Compressor started'),
				line(40, 'Compressor stopped'),
				line(460, 'Compressor started'),
				line(462, 'Low suction pressure trip'),
				line(480, 'Compressor started'),
				line(485, 'Compressor stopped'),
				line(500, 'Compressor started')
			]
		});
		expect(starts.map((start) => [start.startedAt, start.outcome])).toEqual([
			[at(0), 'held'],
			[at(460), 'tripped'],
			[at(480), 'unclear'],
			[at(500), 'lost']
		]);
		// Seven hours of rest: a first start, and its second try after it.
		expect(starts[1]).toMatchObject({ startupTrip: true, firstStart: true, restSeconds: 420 * 60, tryNumber: 1 });
		expect(starts[2]).toMatchObject({ tryNumber: 2, episode: at(460), firstStart: false });
	});

	it('takes nothing where a trend log covers the time', () => {
		const events = [line(0, 'Low oil flow'), line(600, 'Low oil flow')];
		const starts = record({ events, covered: [{ from: at(500), to: at(700) }] });
		expect(starts.map((start) => start.startedAt)).toEqual([at(0)]);
	});

	it('reads an organisation’s own words', () => {
		const events = [line(0, 'Kode 77')];
		expect(record({ events, tripWords: [{ words: 'kode 77', kind: 'motor-temperature' }] })[0]?.trip?.kind).toBe(
			'motor-temperature'
		);
	});
});

describe('a typed record', () => {
	it('is a start-up trip only when both ends are known and inside the window', () => {
		const starts = record({ typed: [typed(0, 3, { text: 'low evap sat' }), typed(100, 130), typed(null, 300)] });
		expect(starts.map((start) => start.startupTrip)).toEqual([true, false, false]);
		expect(starts[0]?.trip?.kind).toBe('low-evaporator-saturation');
		expect(starts.map((start) => start.restSeconds)).toEqual([null, null, null]);
	});

	it('takes the words of the alarm that came with it, once', () => {
		const starts = record({
			typed: [typed(0, 3)],
			events: [line(4, 'High oil temp cutout'), line(200, 'Low oil flow')]
		});
		expect(starts).toHaveLength(2);
		expect(starts[0]).toMatchObject({ source: 'typed', trip: { kind: 'high-oil-temperature' } });
	});

	it('is attended when somebody says so, or was there', () => {
		const visits = [{ from: at(90), to: at(120) }];
		const starts = record({ typed: [typed(0, 3, { attended: true }), typed(100, 102), typed(200, 202)], visits });
		expect(starts.map((start) => start.attended)).toEqual([true, true, false]);
	});
});
