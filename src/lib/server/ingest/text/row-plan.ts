import { BAD_KINDS, readCell, type BadKind, type CellValue } from '../values/cell';
import type { DateOrder } from '../types';

/** What a row reader needs to know of a table. */
export type RowPlan = {
	delimiter: string;
	decimal: '.' | ',';
	/** Cells of a row; further ones must be blank. */
	width: number;
	time: { column: number; clockColumn: number; order: DateOrder; year: number | null };
	/** Positions of cells read as numbers, and of those kept as words; a column in both keeps as words what is no number. */
	numbers: readonly number[];
	words: readonly number[];
};

/** A row as read; reused from row to row. Slots follow the plan's `numbers` and `words`. */
export type RowView = {
	line: number;
	/** ms as if the wall clock were UTC. */
	wall: number;
	/** Minutes east of UTC, or NaN. */
	offset: number;
	numbers: Float64Array;
	/** Index into {@link BAD_KINDS} plus one; 0 for a reading. */
	bad: Uint8Array;
	/** Codes of the plan's dictionaries; −1 for a blank. */
	words: Int32Array;
};

export type OddRow = 'no-time' | 'long' | 'cut-off';

export type RowHandler = {
	row(view: RowView): void;
	/** A line that is no row of readings, as text. */
	odd(line: number, text: string, why: OddRow): void;
};

/** Words of a column by number, so that a row keeps four bytes of them. */
export class Dictionary {
	readonly list: string[] = [];
	#codes = new Map<string, number>();
	#last: Buffer = Buffer.alloc(0);
	#lastCode = -1;

	/** Code of a word; −1 for a blank one. */
	code(word: string): number {
		const trimmed = word.trim();
		if (trimmed === '') return -1;
		let code = this.#codes.get(trimmed);
		if (code === undefined) {
			code = this.list.length;
			this.list.push(trimmed);
			this.#codes.set(trimmed, code);
		}
		return code;
	}

	/** {@link code} of bytes; the word before is compared first, since columns of words seldom change. */
	codeOf(b: Buffer, from: number, to: number): number {
		if (from === to) return -1;
		const last = this.#last;
		if (last.length === to - from) {
			let i = 0;
			while (i < last.length && last[i] === b[from + i]) i++;
			if (i === last.length) return this.#lastCode;
		}
		this.#last = Buffer.from(b.subarray(from, to));
		this.#lastCode = this.code(b.toString('utf8', from, to));
		return this.#lastCode;
	}
}

const BAD_CODE = new Map<BadKind, number>(BAD_KINDS.map((kind, i) => [kind, i + 1]));
export const BLANK = BAD_CODE.get('blank') ?? 1;
export const UNREADABLE = BAD_CODE.get('unreadable') ?? 1;

/** Code of a kind in {@link RowView}'s `bad`. */
export function badCode(kind: BadKind): number {
	return BAD_CODE.get(kind) ?? UNREADABLE;
}

/** Numbers from cells that are no plain number: unit behind, thousands mark, marker of no reading. Kept once read. */
export class SlowCells {
	readonly #decimal: '.' | ',';
	readonly #out: CellValue = { value: NaN, bad: null };
	#known = new Map<string, { value: number; bad: number }>();

	constructor(decimal: '.' | ',') {
		this.#decimal = decimal;
	}

	read(text: string): { value: number; bad: number } {
		const known = this.#known.get(text);
		if (known) return known;
		readCell(text, this.#decimal, this.#out);
		const fresh = { value: this.#out.value, bad: this.#out.bad === null ? 0 : badCode(this.#out.bad) };
		if (this.#known.size > 5000) this.#known.clear();
		this.#known.set(text, fresh);
		return fresh;
	}
}
