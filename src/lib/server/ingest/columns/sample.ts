import { MEASURES, type Quantity } from '$lib/model/quantities';
import { cellUnit, readCell, type CellValue } from '../values/cell';
import { unitOf, type UnitMeaning } from '../values/units';
import { isNothing, runStateOf, stateOf } from '../values/words';
import { nameParts } from './tokens';

/** Readings of one column (or point) spread over the log, and what its name and cells show. */
export type ColumnSample = {
	/** Index of its file among the upload's plans. */
	file: number;
	/** Position in the row; −1 for a point of a long layout. */
	index: number;
	column: string;
	words: string[];
	unit: UnitMeaning | null;
	unitText: string;
	/** ms UTC and figures as in the file, NaN = no reading; in the log's order. */
	t: number[];
	v: number[];
	cells: string[];
	/** How many of the first readings follow each other without a break. */
	headRows: number;
	shape: ColumnShape;
};

/** What the cells are. */
export type ColumnShape = {
	filled: number;
	numbers: number;
	/** Words of on and off (or of a machine that turns and stands), and other words. */
	states: number;
	runStates: number;
	words: number;
	least: number;
	most: number;
	median: number;
	/** Different figures seen, at most 50. */
	distinct: number;
	/** Every figure is 0 or 1. */
	binary: boolean;
	/** Never falls, and rises. */
	rising: boolean;
	/** Smallest step between different figures. */
	increment: number | null;
};

const EMPTY: ColumnShape = {
	filled: 0,
	numbers: 0,
	states: 0,
	runStates: 0,
	words: 0,
	least: NaN,
	most: NaN,
	median: NaN,
	distinct: 0,
	binary: false,
	rising: false,
	increment: null
};

function numberShape(shape: ColumnShape, v: readonly number[]): void {
	const numbers = v.filter((x) => !Number.isNaN(x));
	if (numbers.length === 0) return;
	const sorted = [...numbers].sort((a, b) => a - b);
	shape.least = sorted[0] ?? NaN;
	shape.most = sorted.at(-1) ?? NaN;
	shape.median = sorted[Math.floor(sorted.length / 2)] ?? NaN;
	let distinct = 1;
	let step = Infinity;
	for (let i = 1; i < sorted.length; i++) {
		const d = (sorted[i] ?? 0) - (sorted[i - 1] ?? 0);
		if (d <= 0) continue;
		distinct++;
		// Rounding of decimal figures is no step: 0.1 + 0.2 and 0.3 are one figure.
		if (d < step && d > 1e-9 * Math.max(1, Math.abs(sorted[i] ?? 0))) step = d;
	}
	shape.distinct = Math.min(50, distinct);
	shape.increment = Number.isFinite(step) ? step : null;
	shape.binary = sorted.every((x) => x === 0 || x === 1);
	shape.rising = distinct > 1 && numbers.every((x, i) => i === 0 || x >= (numbers[i - 1] ?? x));
}

/** Reads a column's sampled cells. `unitCell` is the header's or row's unit of measure, if any. */
export function sampleColumn(
	place: { file: number; index: number; column: string; unitCell: string; headRows: number },
	t: number[],
	cells: string[],
	decimal: '.' | ','
): ColumnSample {
	const { words, unitText } = nameParts(place.column);
	const shape: ColumnShape = { ...EMPTY };
	const out: CellValue = { value: NaN, bad: null };
	const suffixes = new Map<string, number>();
	const v = cells.map((cell) => {
		if (cell.trim() === '') return NaN;
		shape.filled++;
		readCell(cell, decimal, out);
		if (out.bad === null) {
			shape.numbers++;
			const end = cell.charCodeAt(cell.length - 1);
			const suffix = end >= 48 && end <= 57 ? '' : cellUnit(cell);
			if (suffix) suffixes.set(suffix, (suffixes.get(suffix) ?? 0) + 1);
			return out.value;
		}
		const state = stateOf(cell);
		if (!Number.isNaN(state)) shape.states++;
		if (!Number.isNaN(runStateOf(cell))) shape.runStates++;
		else if (!isNothing(cell) && out.bad === 'unreadable') shape.words++;
		return Number.isNaN(state) ? runStateOf(cell) : state;
	});
	numberShape(shape, v);
	const suffix = [...suffixes].sort((a, b) => b[1] - a[1])[0]?.[0] ?? '';
	const said = [place.unitCell, unitText, suffix].find((text) => text !== '' && unitOf(text) !== null) ?? '';
	return {
		file: place.file,
		index: place.index,
		column: place.column,
		words,
		unit: said === '' ? null : unitOf(said),
		unitText: said,
		t,
		v,
		cells,
		headRows: place.headRows,
		shape
	};
}

/** The quantity that the unit of measure in the header says, or null. */
export function saidQuantity(sample: ColumnSample): Quantity | null {
	const first = sample.unit?.[0];
	return first === undefined ? null : MEASURES[first].quantity;
}
