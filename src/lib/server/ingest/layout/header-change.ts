import { papaRows } from '../text/papa';
import type { ColumnPlan, FilePlan } from '../types';

/** A row of names in mid-file that is not the header the table began with. */
export type HeaderChange = {
	line: number;
	/** How the rows after it are read; null where their time or their columns cannot be placed. */
	plan: FilePlan | null;
	/** Names that were not there before, and names that are gone. */
	appeared: string[];
	gone: string[];
};

/** Rows are handed over up to this length: a longer header cannot be trusted to be whole. */
const MOST_TEXT = 4000;
const bareOf = (cell: string): string => cell.replace(/["\s]/g, '');

/**
 * Is a row without a time another header? It is when at least two of its names, and half of the shorter of both
 * headers, are names of the first. Columns are placed by name; of equal names the first unused one is taken.
 * @param text the row as it stands
 */
export function headerChange(text: string, line: number, plan: FilePlan): HeaderChange | null {
	if (plan.headerLine === 0 || plan.headerText === '') return null;
	const cells = papaRows(text, plan.delimiter)[0]?.cells ?? [];
	const names = cells.map(bareOf);
	const before = plan.headerText.split(plan.delimiter);
	const free = new Map<string, number[]>();
	before.forEach((name, i) => {
		if (name !== '') free.set(name, [...(free.get(name) ?? []), i]);
	});
	const count = (list: readonly string[]): number => list.filter((name) => name !== '').length;
	const from = names.map((name) => free.get(name)?.shift() ?? -1);
	const shared = from.filter((i) => i >= 0).length;
	if (shared < 2 || shared < Math.min(count(names), count(before)) / 2) return null;
	const appeared = cells.filter((cell, i) => from[i] === -1 && cell.trim() !== '').map((cell) => cell.trim());
	const gone = before.filter((name, i) => name !== '' && !from.includes(i));
	const column = from.indexOf(plan.time.column);
	const clockColumn = plan.time.clockColumn < 0 ? -1 : from.indexOf(plan.time.clockColumn);
	const placed = column >= 0 && (plan.time.clockColumn < 0 || clockColumn >= 0) && text.length < MOST_TEXT;
	if (!placed || plan.kind !== 'wide') return { line, plan: null, appeared, gone };
	const columns = plan.columns.flatMap((old): ColumnPlan[] => {
		const index = from.indexOf(old.index);
		return index < 0 ? [] : [{ ...old, index }];
	});
	const next: FilePlan = {
		...plan,
		headerLine: line,
		dataLine: line + 1,
		width: cells.length,
		headerText: bareOf(text),
		time: { ...plan.time, column, clockColumn },
		columns
	};
	return { line, plan: next, appeared, gone };
}
