import type { DayStrip, Stroke } from '$lib/model/wire/views';
import type { StartRow } from '$lib/server/repositories/starts';
import { addDays, datesBetween, dayStart } from './site-clock';

/** Runs as strokes on the clock of each day of a site. */

export type Covered = readonly (readonly [number, number])[];

const MINUTE = 60_000;

function strokeOn(row: StartRow, end: number, midnight: number, next: number): Stroke | null {
	if (row.startedAt >= next || end < midnight) return null;
	const began = row.startedAt < midnight;
	const goesOn = end > next;
	return {
		startId: row.id,
		circuit: row.circuit,
		from: began ? 0 : (row.startedAt - midnight) / MINUTE,
		to: (Math.min(end, next) - midnight) / MINUTE,
		beganBefore: began,
		goesOn,
		outcome: row.outcome,
		startupTrip: row.record.startupTrip,
		attended: row.record.attended,
		...(row.source === 'log' ? {} : { noted: true })
	};
}

function loggedOn(covered: Covered, midnight: number, next: number): [number, number][] {
	return covered.flatMap(([from, to]) => {
		const begin = Math.max(from, midnight);
		const end = Math.min(to, next);
		return begin < end ? [[(begin - midnight) / MINUTE, (end - midnight) / MINUTE] as [number, number]] : [];
	});
}

/**
 * One strip for each date, with the runs that touch it. `lastAt` (ms) ends a run that still goes on at the log's end.
 */
export function dayStrips(
	rows: readonly StartRow[],
	covered: Covered,
	from: string,
	to: string,
	zone: string,
	lastAt: number
): DayStrip[] {
	return datesBetween(from, to).map((date) => {
		const midnight = dayStart(date, zone);
		const next = dayStart(addDays(date, 1), zone);
		const strokes = rows.flatMap(
			(row) => strokeOn(row, row.endedAt ?? Math.max(lastAt, row.startedAt), midnight, next) ?? []
		);
		return { date, strokes, logged: loggedOn(covered, midnight, next) };
	});
}

/** Share of the time from `from` to `to` (ms) that has a log. */
export function coverageOf(covered: Covered, from: number, to: number): number {
	if (to <= from) return 0;
	let sum = 0;
	for (const [begin, end] of covered) sum += Math.max(0, Math.min(end, to) - Math.max(begin, from));
	return Math.min(1, sum / (to - from));
}

/** Stretches of several circuits joined where they touch or overlap. */
export function joinCovered(all: readonly Covered[]): [number, number][] {
	const sorted = all.flat().map(([from, to]) => [from, to] as [number, number]);
	sorted.sort((a, b) => a[0] - b[0]);
	const joined: [number, number][] = [];
	for (const stretch of sorted) {
		const last = joined.at(-1);
		if (last && stretch[0] <= last[1]) last[1] = Math.max(last[1], stretch[1]);
		else joined.push(stretch);
	}
	return joined;
}
