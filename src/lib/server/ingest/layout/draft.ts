import type { Leaf } from '../container/unpack';
import type { Look } from '../text/look';
import { papaRows, type TextRow } from '../text/papa';
import { decideTime } from '../time/time-plan';
import type { Choice, FilePlan, Problem, ReadContext } from '../types';
import { guessDecimal } from './decimal';
import { findHeader, type Header } from './header';
import { columnKinds, eventRoles, longRoles, noRoles, type ColumnKind } from './kind';
import { findTable } from './table';

/** A file as looked at: its plan so far, its header, and rows from its whole length. */
export type Draft = {
	leaf: Leaf;
	look: Look;
	plan: FilePlan;
	header: Header;
	/** Data rows: the head's, then runs spread over the rest, in the file's order. */
	rows: TextRow[];
	/** How many of `rows` are from the head, and so follow each other without a break. */
	headRows: number;
	kinds: ColumnKind[];
	choices: Choice[];
};

/** Rows of the head that are looked at one after another; the head's others are seen in runs, as the rest of the file. */
const MOST_HEAD_ROWS = 200;
const HEAD_RUNS = 100;
const RUN = 3;
/** Rows that decide which kind of layout a table has. */
const MOST_JUDGED = 600;

/** Where another header stands among rows: what follows it has its columns elsewhere. −1 when there is none. */
function nextHeader(rows: readonly TextRow[], names: readonly string[]): number {
	const known = new Set(names);
	return rows.findIndex(({ cells }) => {
		const same = cells.map((cell) => cell.trim());
		return same.filter((cell) => known.has(cell)).length >= 2 && same.some((cell, i) => cell !== (names[i] ?? ''));
	});
}

function sampleRows(
	look: Look,
	delimiter: string,
	head: TextRow[],
	{ dataLine, names }: Header
): { rows: TextRow[]; headRows: number } {
	const all = head.filter((row) => row.line >= dataLine);
	const next = nextHeader(all, names);
	const data = next < 0 ? all : all.slice(0, next);
	const headRows = Math.min(data.length, MOST_HEAD_ROWS);
	const rows = data.slice(0, headRows);
	const every = Math.max(RUN, Math.floor((data.length - headRows) / HEAD_RUNS));
	for (let at = headRows; at < data.length; at += every) rows.push(...data.slice(at, Math.min(at + RUN, at + every)));
	// Behind another header the columns are placed anew: its rows say nothing of these.
	for (const run of next < 0 ? look.runs : []) {
		// A run may begin inside a quoted cell: rows of another width are not believed.
		for (const row of papaRows(run.lines.join('\n'), delimiter, run.line)) rows.push(row);
	}
	return { rows, headRows };
}

function stampText(row: TextRow, column: number, clockColumn: number): string {
	const date = row.cells[column] ?? '';
	return clockColumn < 0 ? date : `${date} ${row.cells[clockColumn] ?? ''}`;
}

function median(values: readonly number[]): number | null {
	const sorted = [...values].sort((a, b) => a - b);
	return sorted[Math.floor(sorted.length / 2)] ?? null;
}

/** Seconds between neighbouring rows of the head: the median of those that are no repeats. */
export function usualStep(times: readonly number[]): number | null {
	const steps: number[] = [];
	for (let i = 1; i < times.length; i++) {
		const step = Math.abs((times[i] ?? NaN) - (times[i - 1] ?? NaN)) / 1000;
		if (step > 0) steps.push(step);
	}
	return median(steps);
}

/**
 * Looks at a text as a table: delimiter, header, decimal sign, time and kind of layout. A problem when it is none.
 */
export function draftFile(leaf: Leaf, look: Look, ctx: ReadContext): Draft | Problem {
	const table = findTable(look, ctx.now);
	if (!table) return noTable(leaf, look);
	const header = findHeader(look.head, table);
	const width = Math.max(table.width, header.names.length);
	const { rows, headRows } = sampleRows(look, table.delimiter, papaRows(look.head, table.delimiter), header);
	const { column, clockColumn, time } = table.place;
	const skip = [column, clockColumn];
	const cells = rows.slice(0, 400).flatMap((row) => row.cells.filter((_, i) => !skip.includes(i)));
	const decimal = guessDecimal(cells, table.delimiter);
	const answered = ctx.answers?.decimal;
	const sign = answered === '.' || answered === ',' ? answered : decimal.decimal;
	const grid = rows.slice(0, MOST_JUDGED).map((row) => row.cells);
	const kinds = columnKinds(header.names, grid, sign);
	const timing = decideTime(
		{
			column,
			clockColumn,
			time,
			cells: rows.map((row) => stampText(row, column, clockColumn)),
			header: header.names[column] ?? '',
			titles: header.titles.map((cells) => cells.join(' '))
		},
		ctx
	);
	const long = longRoles(kinds, grid, skip);
	const events = long ? null : eventRoles(kinds, grid, skip);
	const choices = timing.choices;
	if (!decimal.sure) {
		choices.push({
			key: 'decimal',
			question: 'Is the comma a decimal sign or does it group thousands?',
			chosen: sign,
			options: [
				{ value: ',', label: 'decimal sign', sample: `${decimal.sample} is ${decimal.sample.replace(',', '.')}` },
				{ value: '.', label: 'groups thousands', sample: `${decimal.sample} is ${decimal.sample.replace(',', '')}` }
			],
			sure: answered !== undefined
		});
	}
	const plan: FilePlan = {
		file: leaf.file,
		source: leaf.source,
		entry: leaf.entry,
		container: leaf.container,
		kind: long ? 'long' : events ? 'events' : 'wide',
		delimiter: table.delimiter,
		decimal: sign,
		encoding: look.form.encoding,
		headerLine: header.headerLine,
		dataLine: header.dataLine,
		width,
		headerText: (look.head.split('\n')[header.headerLine - 1] ?? '').replace(/["\s]/g, ''),
		time: timing.plan,
		columns: [],
		roles: long ?? events ?? noRoles(),
		intervalSeconds: null,
		lines: look.lines
	};
	return { leaf, look, plan, header, rows, headRows, kinds, choices };
}

function noTable(leaf: Leaf, look: Look): Problem {
	const first = look.head.split('\n').findIndex((line) => line.trim() !== '');
	const base = { file: leaf.file, column: null };
	if (first < 0) return { ...base, line: null, kind: 'empty', message: `${leaf.file} holds no rows.` };
	if (look.lines - first <= 1) {
		return { ...base, line: first + 1, kind: 'no-rows', message: `${leaf.file} has a header but no rows.` };
	}
	return {
		...base,
		line: first + 1,
		kind: 'no-time',
		message: `${leaf.file} has no column of times that can be read in its rows, so nothing in it can be placed in time.`
	};
}
