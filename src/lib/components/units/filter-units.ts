import type { UnitSummary } from '$lib/model/wire/views';
import { csvRow } from '$lib/utils/csv';

export const UNIT_SORTS = {
	worst: 'Worst repeater first',
	tag: 'By site and tag',
	trips: 'Most start-up trips',
	visit: 'Next visit first',
	coverage: 'Least log coverage'
} as const;
export type UnitSort = keyof typeof UNIT_SORTS;
export type UnitFilter = {
	text: string;
	site: string;
	only: 'all' | 'tripping' | 'open-case' | 'cannot-tell';
	sort: UnitSort;
};

const byText = (a: string, b: string) => a.localeCompare(b, 'en', { numeric: true });

const ORDER: Readonly<Record<UnitSort, (a: UnitSummary, b: UnitSummary) => number>> = {
	// The API sends them so; a stable sort keeps it.
	worst: () => 0,
	tag: (a, b) => byText(a.site.name, b.site.name) || byText(a.unit.tag, b.unit.tag),
	trips: (a, b) => b.startupTrips - a.startupTrips,
	visit: (a, b) => byText(a.nextVisit?.date ?? '9999', b.nextVisit?.date ?? '9999'),
	coverage: (a, b) => (a.coverage ?? -1) - (b.coverage ?? -1)
};

/** The rows a person asked for, in the order they asked for. */
export function filterUnits(rows: readonly UnitSummary[], filter: UnitFilter): UnitSummary[] {
	const words = filter.text.toLowerCase().split(/\s+/).filter(Boolean);
	return rows
		.filter((row) => {
			if (filter.site && row.site.id !== filter.site) return false;
			if (filter.only === 'tripping' && row.startupTrips === 0) return false;
			if (filter.only === 'open-case' && row.openCase === null) return false;
			if (filter.only === 'cannot-tell' && row.verdict !== 'cannot-tell') return false;
			const name = `${row.unit.tag} ${row.site.name} ${row.leading?.name ?? ''}`.toLowerCase();
			return words.every((word) => name.includes(word));
		})
		.sort(ORDER[filter.sort]);
}

/** How the last first starts went, in a few words, with the count behind them. */
export function rowInARow(row: UnitSummary): { text: string; trip: boolean } {
	const last = row.lastFirst.at(-1);
	if (row.trippedInARow > 1) return { text: `${row.trippedInARow} tripped in a row`, trip: true };
	if (last === undefined) return { text: 'no first start logged', trip: false };
	if (last === 'tripped') return { text: 'the last one tripped', trip: true };
	if (!row.lastFirst.includes('tripped')) return { text: 'none tripped', trip: false };
	const since = row.lastFirst.length - 1 - row.lastFirst.lastIndexOf('tripped');
	return { text: since === 1 ? 'none since the last' : `none in the last ${since}`, trip: false };
}

/** The rows as CSV, one a unit. */
export function unitsCsv(rows: readonly UnitSummary[]): string {
	const header =
		'unit,site,starts,start-up trips,first tries,of them tripped,share low,share high,tripped in a row,leading suspect,standing,log coverage,open case,next visit';
	const cells = rows.map((row) => [
		row.unit.tag,
		row.site.name,
		row.starts,
		row.startupTrips,
		row.firstTries.m,
		row.firstTries.k,
		row.firstTries.low,
		row.firstTries.high,
		row.trippedInARow,
		row.withheld ? null : (row.leading?.name ?? null),
		row.withheld ? null : (row.leading?.standing ?? null),
		row.coverage,
		row.openCase?.number ?? null,
		row.nextVisit?.date ?? null
	]);
	return [header.split(','), ...cells].map(csvRow).join('');
}
