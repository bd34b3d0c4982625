import { papaRows, type TextRow } from '../text/papa';
import type { Look } from '../text/look';
import { clockShare, columnTime, type ColumnTime } from '../time/time-form';
import { readNumber } from '../values/cell';

/** Where the time stands in a table, and how it reads there. */
export type TimePlace = { column: number; clockColumn: number; time: ColumnTime; firstRow: number };

/** A text cut into rows by one delimiter, with its time found. */
export type Table = {
	delimiter: string;
	rows: TextRow[];
	/** Cells of most rows. */
	width: number;
	place: TimePlace;
	/** Share of the data cells that are numbers. */
	numbers: number;
};

const DELIMITERS = [',', ';', '\t', '|'] as const;
const TIME_WORDS = /time|date|stamp|epoch|unix|zeit|datum|heure|fecha|hora|\bts\b/i;

/** The cell count that most rows of the later part have: titles stand at the top. */
function widthOf(rows: readonly TextRow[]): number {
	const counts = new Map<number, number>();
	for (const row of rows.slice(Math.floor(rows.length / 4)))
		counts.set(row.cells.length, (counts.get(row.cells.length) ?? 0) + 1);
	let best = 0;
	for (const [width, n] of counts)
		if (n > (counts.get(best) ?? 0) || (n === counts.get(best) && width > best)) best = width;
	return best;
}

/** First row whose cell in a column reads as time, then how the column reads from there on. */
function columnAt(
	rows: readonly TextRow[],
	column: number,
	now: number
): { time: ColumnTime; firstRow: number } | null {
	const cell = (row: TextRow) => row.cells[column]?.trim() ?? '';
	const numeric =
		column === 0 || rows.slice(0, 40).some((row) => TIME_WORDS.test(cell(row)) && !/\d{4}/.test(cell(row)));
	const tail = rows.slice(Math.floor(rows.length / 3), Math.floor(rows.length / 3) + 12).map(cell);
	if (rows.length > 20 && !columnTime(tail, now, numeric, 0.3)) return null;
	for (let i = 0; i < Math.min(rows.length, 120); i++) {
		const row = rows[i];
		if (!row || !columnTime([cell(row)], now, numeric)) continue;
		const cells = rows.slice(i).map(cell);
		const time = columnTime(cells, now, numeric, 0.6);
		// A title line may hold a date too: then the rows right after it read worse than the table does.
		const next = rows.slice(i + 1, i + 4).filter((r) => columnTime([cell(r)], now, numeric)).length;
		if (time && (next > 0 || i >= rows.length - 2 || rows.length - i < 3)) return { time, firstRow: i };
	}
	return null;
}

function clockColumnOf(rows: readonly TextRow[], column: number, firstRow: number, width: number): number {
	const data = rows.slice(firstRow, firstRow + 100);
	for (const c of [column + 1, ...Array.from({ length: Math.min(width, 8) }, (_, i) => i)]) {
		if (c === column || c >= width) continue;
		if (clockShare(data.map((row) => row.cells[c] ?? '')) >= 0.8) return c;
	}
	return -1;
}

function findTime(rows: readonly TextRow[], width: number, now: number): TimePlace | null {
	for (let column = 0; column < Math.min(width, 60); column++) {
		const found = columnAt(rows, column, now);
		if (!found) continue;
		const clockColumn = found.time.hasClock ? -1 : clockColumnOf(rows, column, found.firstRow, width);
		return { column, clockColumn, ...found };
	}
	return null;
}

function numberShare(rows: readonly TextRow[], place: TimePlace): number {
	let numbers = 0;
	let filled = 0;
	for (const row of rows.slice(place.firstRow, place.firstRow + 60)) {
		for (const [i, cell] of row.cells.entries()) {
			if (i === place.column || i === place.clockColumn || cell.trim() === '') continue;
			filled++;
			if (!Number.isNaN(readNumber(cell.trim(), '.')) || !Number.isNaN(readNumber(cell.trim(), ','))) numbers++;
		}
	}
	return filled === 0 ? 0 : numbers / filled;
}

/**
 * The table of a text: the delimiter whose rows have a time column, agree most in their cell count and hold most
 * numbers. Null when no delimiter gives a time column.
 */
export function findTable(look: Look, now: number): Table | null {
	let best: { table: Table; score: number } | null = null;
	for (const delimiter of DELIMITERS) {
		const rows = papaRows(look.head, delimiter).slice(0, 600);
		const width = widthOf(rows);
		if (width < 2) continue;
		const place = findTime(rows, width, now);
		if (!place) continue;
		const agreeing = rows.filter((row) => row.cells.length === width).length / rows.length;
		const numbers = numberShare(rows, place);
		const score = agreeing + numbers + 0.1 * Math.log(width);
		if (!best || score > best.score) best = { table: { delimiter, rows, width, place, numbers }, score };
	}
	return best?.table ?? null;
}
