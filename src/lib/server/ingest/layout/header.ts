import { zincHead } from '../container/haystack';
import type { TextRow } from '../text/papa';
import { readNumber } from '../values/cell';
import { isUnitCell } from '../values/units';
import type { Table } from './table';

/** The names of a table's columns, where they stand, and what stands above. */
export type Header = {
	/** As shown, made unique. */
	names: string[];
	/** From a row of units, or empty. */
	units: string[];
	/** Line of the names' row; 0 when there is none. */
	headerLine: number;
	/** First line of the data. */
	dataLine: number;
	/** Cells of lines above the header, in order. */
	titles: string[][];
	/** False when the names are made up. */
	named: boolean;
};

function filled(row: TextRow): string[] {
	return row.cells.filter((cell) => cell.trim() !== '');
}

function isText(cell: string): boolean {
	const t = cell.trim();
	return t !== '' && Number.isNaN(readNumber(t, '.')) && Number.isNaN(readNumber(t, ','));
}

/** A row of names: mostly words, nearly as wide as the table. */
function isNames(row: TextRow, width: number): boolean {
	const cells = filled(row);
	return (
		cells.length >= Math.max(2, Math.min(width * 0.5, width - 2)) && cells.filter(isText).length >= 0.6 * cells.length
	);
}

function isUnits(row: TextRow, place: number): boolean {
	const cells = row.cells.filter((_, i) => i !== place).map((cell) => cell.trim());
	const marks = cells.filter((cell) => cell !== '');
	return marks.length > 0 && marks.filter(isUnitCell).length >= 0.7 * marks.length;
}

/** A row above the names that heads groups of columns (`Circuit 1, , , Circuit 2`): its words go to the blanks after them. */
function groupWords(row: TextRow, width: number): string[] | null {
	const cells = Array.from({ length: width }, (_, i) => row.cells[i]?.trim() ?? '');
	const heads = cells.filter((cell) => cell !== '');
	if (heads.length < 1 || heads.length > width * 0.7 || row.cells.length < width * 0.6) return null;
	if (!heads.every((cell) => isText(cell) && cell.length < 40) || heads.some((cell) => cell.includes(':'))) return null;
	if (heads.length === 1 && cells[0] !== '') return null;
	let current = '';
	return cells.map((cell) => (current = cell !== '' ? cell : current));
}

function unique(names: readonly string[]): string[] {
	const seen = new Map<string, number>();
	return names.map((name, i) => {
		const base = name.replace(/\s+/g, ' ').trim() || `Column ${i + 1}`;
		const n = (seen.get(base) ?? 0) + 1;
		seen.set(base, n);
		return n === 1 ? base : `${base} (${n})`;
	});
}

function nameless(table: Table, titles: string[][]): Header {
	const names = Array.from({ length: table.width }, (_, i) => `Column ${i + 1}`);
	const dataLine = table.rows[table.place.firstRow]?.line ?? 1;
	return { names, units: names.map(() => ''), headerLine: 0, dataLine, titles, named: false };
}

function zincHeader(head: string, table: Table): Header | null {
	const zinc = zincHead(head);
	if (!zinc) return null;
	return {
		names: unique(zinc.names),
		units: zinc.units,
		headerLine: 2,
		dataLine: 3,
		titles: [],
		named: table.width > 0
	};
}

/**
 * The header of a table: the row of names above the first data row, with a row of units or of groups beside it where
 * there is one. Lines further up are titles.
 * @param head the text's first lines
 */
export function findHeader(head: string, table: Table): Header {
	const zinc = zincHeader(head, table);
	if (zinc) return zinc;
	const { rows, width, place } = table;
	const above = rows.slice(0, place.firstRow);
	let at = above.length - 1;
	let units: string[] = [];
	const last = above[at];
	const before = above[at - 1];
	if (last && before && isUnits(last, place.column) && isNames(before, width)) {
		units = last.cells.map((cell) => cell.trim());
		at--;
	}
	// Notes may stand between the names and the data; a table without names has neither.
	while (at >= 0 && at >= above.length - 4 && !isNames(above[at] as TextRow, width)) at--;
	const names = above[at];
	if (!names || !isNames(names, width))
		return nameless(
			table,
			above.map((row) => row.cells)
		);
	let from = at;
	let own = Array.from({ length: width }, (_, i) => names.cells[i] ?? '');
	const upper = above[at - 1];
	if (units.length === 0 && upper && isUnits(upper, place.column) && upper.cells.length >= width - 1) {
		units = upper.cells.map((cell) => cell.trim());
		from = at - 1;
	} else if (upper) {
		const groups = groupWords(upper, width);
		if (groups) {
			from = at - 1;
			own = own.map((name, i) => (i === place.column || groups[i] === '' ? name : `${groups[i]} ${name}`));
		}
	}
	return {
		names: unique(own),
		units: Array.from({ length: width }, (_, i) => units[i] ?? ''),
		headerLine: names.line,
		dataLine: rows[place.firstRow]?.line ?? names.line + 1,
		titles: above.slice(0, from).map((row) => row.cells),
		named: true
	};
}
