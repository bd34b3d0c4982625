import { FIGURES, FIGURE_KEYS, type AbsentReason, type FigureKey } from '$lib/model/start';
import type { Quantity } from '$lib/model/quantities';
import { FIGURE_WORDS, OUTCOME_WORDS, TRIP_KIND_WORDS } from '$lib/model/words';
import type { Start } from '$lib/model/wire/start';
import { formatDuration } from '$lib/utils/clock';
import { csvRow } from '$lib/utils/csv';
import { formatNumber } from '$lib/utils/format';

/** The figures shown before a person asks for all of them: what tells a tripped start from a held one at a glance. */
export const FIRST_FIGURES: readonly FigureKey[] = [
	'startCapacity',
	'minEvapSaturation',
	'headroom.evapSaturation',
	'condWaterInAtStart',
	'waterOutAtStart',
	'liftAtStart',
	'minMargin',
	'maxValvePosition'
];

/** Why a figure is absent, as short as a cell of the table is; the whole sentence stands behind it. */
export const ABSENT_WORDS: Readonly<Record<AbsentReason, string>> = {
	'signal-missing': 'not logged',
	gap: 'gap',
	'run-too-short': 'run too short',
	'too-coarse': 'too coarse',
	'does-not-apply': 'not of this unit',
	'no-settled-stretch': 'never settled',
	'no-limit': 'no limit',
	'no-rest': 'no rest',
	'cannot-tell': 'cannot tell'
};

/** Figures of which at least one start has a value, in the model's order. */
export function figuresWithValues(starts: readonly Start[]): FigureKey[] {
	return FIGURE_KEYS.filter((key) => starts.some((start) => typeof start.figures[key] === 'number'));
}

/** The unit of measure a figure's column is in, from what the answer says of its quantity. */
export function figureUnit(key: FigureKey, units: Readonly<Record<string, string>>): string {
	const quantity: Quantity = FIGURES[key];
	return quantity === 'duration' ? '' : (units[quantity] ?? '');
}

/** Quantities printed without decimals; the rest take one. */
const WHOLE: ReadonlySet<string> = new Set(['flow', 'duty', 'voltage', 'count']);

/** A figure as its cell prints it; headroom, margins and slopes carry their sign. */
export function figureText(key: FigureKey, value: number, units: Readonly<Record<string, string>>): string {
	const quantity: Quantity = FIGURES[key];
	if (quantity === 'duration') return formatDuration(value);
	const wholeKpa = quantity === 'pressureDifference' && units.pressureDifference === 'kPa';
	const decimals = key === 'powerPerDuty' ? 2 : WHOLE.has(quantity) || wholeKpa ? 0 : 1;
	return formatNumber(value, decimals, { sign: /headroom|argin|lope|Lift/.test(key) });
}

export type SortKey = 'startedAt' | 'outcome' | 'rest' | 'length' | 'try' | FigureKey;
export type Sort = { key: SortKey; down: boolean };

function sortValue(start: Start, key: SortKey): number | string | null {
	switch (key) {
		case 'startedAt':
			return Date.parse(start.startedAt);
		case 'outcome':
			return `${OUTCOME_WORDS[start.outcome]} ${start.trip?.kind ?? ''}`;
		case 'rest':
			return start.restSeconds;
		case 'length':
			return lengthSeconds(start);
		case 'try':
			return start.tryNumber;
		default:
			return start.figures[key] ?? null;
	}
}

/** How long a start ran, seconds; null while it runs. */
export function lengthSeconds(start: Pick<Start, 'startedAt' | 'endedAt'>): number | null {
	return start.endedAt === null ? null : (Date.parse(start.endedAt) - Date.parse(start.startedAt)) / 1000;
}

/** Starts in a column's order; absent values stand last both ways. */
export function sortStarts(starts: readonly Start[], sort: Sort): Start[] {
	const way = sort.down ? -1 : 1;
	return [...starts].sort((a, b) => {
		const [x, y] = [sortValue(a, sort.key), sortValue(b, sort.key)];
		if (x === null || y === null) return Number(x === null) - Number(y === null);
		return x < y ? -way : x > y ? way : Date.parse(a.startedAt) - Date.parse(b.startedAt);
	});
}

export type StartFilter = { outcome: Start['outcome'] | ''; only: '' | 'first' | 'startup-trips' | 'first-tries' };

/** The starts a person asked for. */
export function filterStarts(starts: readonly Start[], filter: StartFilter): Start[] {
	return starts.filter((start) => {
		if (filter.outcome && start.outcome !== filter.outcome) return false;
		if (filter.only === 'first' && !start.firstStart) return false;
		if (filter.only === 'startup-trips' && !start.startupTrip) return false;
		return filter.only !== 'first-tries' || start.tryNumber === 1;
	});
}

/** The finding as the sheet's heading. */
export function startsTitle(starts: readonly Start[], noted = 0): string {
	if (starts.length === 0 && noted > 0) return `No trend log in this period; ${noted} on record without one`;
	if (starts.length === 0) return 'No start in this period';
	const trips = starts.filter((start) => start.outcome === 'tripped').length;
	const early = starts.filter((start) => start.startupTrip).length;
	if (trips === 0) return `None of ${starts.length} starts tripped`;
	if (early === trips) return `${trips} of ${starts.length} starts tripped, each inside the start-up window`;
	return `${trips} of ${starts.length} starts tripped, ${early} inside the start-up window`;
}

/** Every start with every figure as CSV; the header names the unit of measure, the clock is UTC. */
export function startsCsv(starts: readonly Start[], units: Readonly<Record<string, string>>): string {
	const header = ['start (UTC)', 'end (UTC)', 'circuit', 'outcome', 'trip kind', 'trip basis', 'start-up trip'];
	header.push('first start', 'try', 'attended', 'known from', 'rest, s', 'uncertainty, s', 'sampled every, s');
	for (const key of FIGURE_KEYS) {
		const unit = FIGURES[key] === 'duration' ? 's' : (units[FIGURES[key]] ?? '');
		header.push(unit ? `${FIGURE_WORDS[key]}, ${unit}` : FIGURE_WORDS[key]);
	}
	const yes = (value: boolean) => (value ? 'yes' : 'no');
	const rows = starts.map((start) => [
		start.startedAt,
		start.endedAt,
		start.circuit,
		OUTCOME_WORDS[start.outcome],
		start.trip ? TRIP_KIND_WORDS[start.trip.kind] : null,
		start.trip?.basis ?? null,
		yes(start.startupTrip),
		yes(start.firstStart),
		start.tryNumber,
		yes(start.attended),
		start.source === 'log' ? 'trend log' : start.source === 'typed' ? 'typed in' : 'alarm list',
		start.restSeconds,
		start.uncertaintySeconds,
		start.spacingSeconds,
		...FIGURE_KEYS.map((key) => start.figures[key] ?? null)
	]);
	return [header, ...rows].map(csvRow).join('');
}
