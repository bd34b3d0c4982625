import type { Start } from '$lib/model/wire/start';
import type { NotedEntry, UnitRecord } from '$lib/model/wire/noted';
import { TRIP_KIND_WORDS } from '$lib/model/words';
import { formatDateClock, formatDuration } from '$lib/utils/clock';
import { counted, formatNumber } from '$lib/utils/format';

/** Where a start without a trend log is known from. */
export const SOURCE_WORDS = { typed: 'typed in', 'alarm-list': 'from an alarm list', log: 'logged' } as const;

/** The finding as the sheet's heading. */
export function recordTitle(record: UnitRecord | undefined, tag: string): string {
	if (!record) return `Starts of ${tag} without a trend log`;
	const { starts, stretches } = record;
	const tripped = starts.filter((start) => start.outcome === 'tripped').length;
	if (starts.length > 0)
		return `${tripped} of ${counted(starts.length, 'start')} on record tripped; no trend log shows them`;
	const told = stretches.filter((stretch) => (stretch.starts ?? 0) > 0);
	const sum = told.reduce((total, stretch) => total + (stretch.starts ?? 0), 0);
	if (sum > 0) return `${counted(sum, 'start')} by the counters; no trend log shows them`;
	return 'No start on record without a trend log';
}

/** What is known of a start, as a sentence after its clock. */
export function startWords(start: Start): string {
	const ran = start.endedAt === null ? null : (Date.parse(start.endedAt) - Date.parse(start.startedAt)) / 1000;
	const untold = start.notes.some((note) => note.startsWith('When it started is not known'));
	const length = untold ? 'start not known' : ran === null ? 'end not known' : `ran ${formatDuration(ran)}`;
	const kind = start.trip ? TRIP_KIND_WORDS[start.trip.kind] : '';
	const text = start.trip?.text ? `“${start.trip.text}”` : '';
	const early = start.startupTrip ? 'inside the start-up window' : '';
	return [length, early, kind, text, start.attended ? 'attended' : ''].filter(Boolean).join(', ');
}

/** What two readings of the counters tell. */
export function stretchWords(stretch: UnitRecord['stretches'][number]): string {
	if (stretch.wentBack) return 'a counter went back: it was reset or replaced, so nothing is told';
	const parts: string[] = [];
	if (stretch.starts !== null) parts.push(counted(stretch.starts, 'start'));
	if (stretch.runSeconds !== null) parts.push(`${formatNumber(stretch.runSeconds / 3600, 1)} h of running`);
	if (stretch.meanRunSeconds !== null) parts.push(`${formatDuration(stretch.meanRunSeconds)} a start on the mean`);
	if ((stretch.shortAtLeast ?? 0) > 0) {
		parts.push(`at least ${stretch.shortAtLeast} ended inside the start-up window`);
	}
	return parts.join(', ');
}

/** Why a typed start does not stand by itself; null when it does. */
export function coveredWords(entry: NotedEntry): string | null {
	if (!entry.covered) return null;
	return entry.loggedStart
		? 'a trend log shows this start: the log tells'
		: 'a trend log covers this time and shows no start near it';
}

/** One entry's figures as a line. */
export function entryWords(entry: NotedEntry, timeZone: string): string {
	if (entry.kind === 'counters') {
		const parts = [
			entry.starts === null ? '' : `${formatNumber(entry.starts)} starts`,
			entry.runHours === null ? '' : `${formatNumber(entry.runHours, 1)} h`
		];
		return parts.filter(Boolean).join(', ');
	}
	const clock = (at: string | null): string => (at ? formatDateClock(at, timeZone) : 'not known');
	return `started ${clock(entry.startedAt)}, stopped ${clock(entry.endedAt)}`;
}
