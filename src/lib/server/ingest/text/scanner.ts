import { StampReader } from '../time/stamp';
import { LogRefusal } from '../types';
import { MOST_LINE } from './look';
import { BLANK, type Dictionary, SlowCells, type RowHandler, type RowPlan, type RowView } from './row-plan';

const POW10 = Float64Array.from({ length: 17 }, (_, i) => 10 ** i);
const SKIP = 0;
const NUMBER = 1;
const WORD = 2;
const TIME = 3;
const CLOCK = 4;
const [LF, CR, SPACE, QUOTE, ZERO, NINE, MINUS, PLUS, POINT] = [10, 13, 32, 34, 48, 57, 45, 43, 46];
/** Digits of a double printed in full, with room. */
const MOST_DIGITS = 24;

/**
 * Reads rows straight from UTF-8 bytes, without making strings of plain numbers and stamps. It stops at the first
 * quote that is more than a pair around a cell, and says where ({@link feed} returns false): the exact reader goes on.
 */
export class RowScanner {
	readonly plan: RowPlan;
	readonly dictionaries: Dictionary[];
	readonly view: RowView;
	/** Bytes not yet read: a record cut off, or everything from the record that stopped the scanner. */
	rest: Buffer = Buffer.alloc(0);
	/** Line of the next record. */
	line: number;
	readonly #handler: RowHandler;
	readonly #stamps: StampReader;
	readonly #slow: SlowCells;
	readonly #jobs: Uint8Array;
	readonly #slots: Int32Array;
	/** Word slot of a number column whose other cells are wanted as words; −1 = none. */
	readonly #mixed: Int32Array;
	readonly #delimiter: number;
	readonly #decimal: number;
	readonly #scratch = Buffer.alloc(96);
	#dateFrom = 0;
	#dateTo = 0;
	#clockFrom = -1;
	#clockTo = -1;
	#cells = 0;
	#surplus = false;
	/** The last column that anybody wants; and whether the piece at hand has no quote. */
	readonly #lastWanted: number;
	#plain = false;

	constructor(plan: RowPlan, handler: RowHandler, dictionaries: Dictionary[], line: number) {
		this.plan = plan;
		this.dictionaries = dictionaries;
		this.line = line;
		this.#handler = handler;
		this.#stamps = new StampReader(plan.time.order, plan.time.year);
		this.#slow = new SlowCells(plan.decimal);
		this.#delimiter = plan.delimiter.charCodeAt(0);
		this.#decimal = plan.decimal.charCodeAt(0);
		this.#jobs = new Uint8Array(plan.width + 1);
		this.#slots = new Int32Array(plan.width + 1);
		this.#mixed = new Int32Array(plan.width + 1).fill(-1);
		plan.words.forEach((column, slot) => this.#set(column, WORD, slot));
		plan.numbers.forEach((column, slot) => {
			if (this.#jobs[column] === WORD) this.#mixed[column] = this.#slots[column] ?? -1;
			this.#set(column, NUMBER, slot);
		});
		this.#set(plan.time.column, TIME, 0);
		if (plan.time.clockColumn >= 0) this.#set(plan.time.clockColumn, CLOCK, 0);
		this.#lastWanted = this.#jobs.findLastIndex((job) => job !== SKIP);
		this.view = {
			line: 0,
			wall: NaN,
			offset: NaN,
			numbers: new Float64Array(plan.numbers.length),
			bad: new Uint8Array(plan.numbers.length),
			words: new Int32Array(plan.words.length)
		};
	}

	#set(column: number, job: number, slot: number): void {
		this.#jobs[column] = job;
		this.#slots[column] = slot;
	}

	/** Reads the records that are complete; false when a record needs the exact reader (it is then in `rest`). */
	feed(chunk: Buffer, last: boolean): boolean {
		let b = this.rest.length > 0 ? Buffer.concat([this.rest, chunk]) : chunk;
		if (last && b.length > 0 && b[b.length - 1] !== LF) b = Buffer.concat([b, Buffer.from([LF])]);
		const end = b.lastIndexOf(LF) + 1;
		this.#plain = !b.includes(QUOTE);
		let at = 0;
		while (at < end) {
			const next = this.#record(b, at, end);
			if (next < 0) {
				// −1: a quoted cell goes on in the next piece; −2: quotes within quotes.
				if (next === -1 && !last && b.length - at < MOST_LINE) break;
				this.rest = b.subarray(at);
				return false;
			}
			at = next;
		}
		this.rest = at === b.length ? Buffer.alloc(0) : Buffer.from(b.subarray(at));
		if (this.rest.length > MOST_LINE) {
			throw new LogRefusal('line-too-long', `Line ${this.line} has no end within a megabyte.`, '', this.line);
		}
		return true;
	}

	/** Reads the record at `at`; the place after it, or −1 or −2 (see {@link feed}). */
	#record(b: Buffer, at: number, end: number): number {
		const jobs = this.#jobs;
		const [delimiter, width] = [this.#delimiter, this.plan.width];
		this.#dateFrom = this.#dateTo = 0;
		this.#clockFrom = -1;
		this.#surplus = false;
		let i = at;
		let column = 0;
		let lines = 1;
		for (;;) {
			const job = column < width ? (jobs[column] as number) : SKIP;
			let stop = i;
			if (b[i] === QUOTE) {
				const close = b.indexOf(QUOTE, i + 1);
				if (close < 0 || close >= end) return -1;
				stop = close + 1;
				if (b[stop] === CR && b[stop + 1] === LF) stop++;
				if (b[stop] !== delimiter && b[stop] !== LF) return -2;
				for (let k = b.indexOf(LF, i); k >= 0 && k < close; k = b.indexOf(LF, k + 1)) lines++;
				this.#take(b, i + 1, close, job, column);
			} else if (job === NUMBER) stop = this.#number(b, i, column);
			else {
				while (b[stop] !== delimiter && b[stop] !== LF) stop++;
				if (job !== SKIP || column >= width) {
					this.#take(b, i, b[stop] === LF && b[stop - 1] === CR && stop > i ? stop - 1 : stop, job, column);
				}
			}
			column++;
			if (this.#plain && column > this.#lastWanted && b[stop] !== LF) {
				// Nobody wants the rest of the row: its cells are only counted, up to those beyond the table.
				let c = b[stop] as number;
				while (column < width && c !== LF) {
					c = b[++stop] as number;
					if (c === delimiter) column++;
				}
				if (c === LF) column++;
			}
			if (b[stop] === LF) {
				if (column < width) this.#blankFrom(column);
				this.#cells = column;
				this.#finish(b, at, stop);
				this.line += lines;
				return stop + 1;
			}
			i = stop + 1;
		}
	}

	/** A row that ends early: the cells it lacks are blank. */
	#blankFrom(column: number): void {
		for (let c = column; c < this.plan.width; c++) {
			const slot = this.#slots[c] as number;
			if (this.#jobs[c] === NUMBER) this.#blank(slot, c);
			else if (this.#jobs[c] === WORD) this.view.words[slot] = -1;
		}
	}

	#blank(slot: number, column: number): void {
		this.view.numbers[slot] = NaN;
		this.view.bad[slot] = BLANK;
		const word = this.#mixed[column] as number;
		if (word >= 0) this.view.words[word] = -1;
	}

	/**
	 * A number cell from `from`; the place of the delimiter or line feed after it. The buffer's part that is read ends
	 * with a line feed, so no place beyond it is looked at.
	 */
	#number(b: Buffer, from: number, column: number): number {
		const delimiter = this.#delimiter;
		const slot = this.#slots[column] as number;
		let i = from;
		let c = b[i] as number;
		while (c === SPACE) c = b[++i] as number;
		const first = i;
		const negative = c === MINUS;
		if (negative || c === PLUS) c = b[++i] as number;
		let mantissa = 0;
		const whole = i;
		while (c >= ZERO && c <= NINE) {
			mantissa = mantissa * 10 + (c - ZERO);
			c = b[++i] as number;
		}
		let digits = i - whole;
		let places = 0;
		if (c === this.#decimal && digits > 0) {
			const point = ++i;
			c = b[i] as number;
			while (c >= ZERO && c <= NINE) {
				mantissa = mantissa * 10 + (c - ZERO);
				c = b[++i] as number;
			}
			places = i - point;
			digits += places;
		}
		const afterDigits = i;
		while (c === SPACE) c = b[++i] as number;
		if (c === CR && b[i + 1] === LF) c = b[++i] as number;
		if (c === delimiter || c === LF) {
			// Up to 15 digits both parts are exact, so one division rounds as a full parser would.
			if (digits > 0 && (digits <= 15 || (digits <= MOST_DIGITS && this.#decimal === POINT))) {
				// More digits than a double holds are left to the engine's own parser, which rounds them once.
				const value =
					digits > 15
						? Number(b.toString('latin1', whole, afterDigits))
						: places > 0
							? mantissa / (POW10[places] as number)
							: mantissa;
				this.view.numbers[slot] = negative ? -value : value;
				this.view.bad[slot] = 0;
				const word = this.#mixed[column] as number;
				if (word >= 0) this.view.words[word] = -1;
				return i;
			}
			if (digits === 0 && afterDigits === first) {
				this.#blank(slot, column);
				return i;
			}
		}
		while (b[i] !== delimiter && b[i] !== LF) i++;
		this.#slowNumber(b, from, i, column);
		return i;
	}

	#slowNumber(b: Buffer, from: number, to: number, column: number): void {
		const slot = this.#slots[column] ?? 0;
		const text = b.toString('utf8', from, to).trim();
		const cell = this.#slow.read(text);
		this.view.numbers[slot] = cell.value;
		this.view.bad[slot] = cell.bad;
		const word = this.#mixed[column] ?? -1;
		if (word >= 0) this.view.words[word] = cell.bad === 0 ? -1 : (this.dictionaries[word]?.code(text) ?? -1);
	}

	#take(b: Buffer, from: number, to: number, job: number, column: number): void {
		const slot = this.#slots[column] ?? 0;
		if (job === WORD) this.view.words[slot] = this.dictionaries[slot]?.codeOf(b, from, to) ?? -1;
		else if (job === TIME) [this.#dateFrom, this.#dateTo] = [from, to];
		else if (job === CLOCK) [this.#clockFrom, this.#clockTo] = [from, to];
		else if (job === NUMBER) this.#slowNumber(b, from, to, column);
		else if (column >= this.plan.width && to > from && b.toString('utf8', from, to).trim() !== '') this.#surplus = true;
	}

	#stamp(b: Buffer): boolean {
		if (this.plan.time.clockColumn < 0) return this.#stamps.read(b, this.#dateFrom, this.#dateTo);
		const dateLength = this.#dateTo - this.#dateFrom;
		const clockLength = this.#clockTo - this.#clockFrom;
		if (this.#clockFrom < 0 || clockLength <= 0 || dateLength + clockLength > 94) return false;
		b.copy(this.#scratch, 0, this.#dateFrom, this.#dateTo);
		this.#scratch[dateLength] = SPACE;
		b.copy(this.#scratch, dateLength + 1, this.#clockFrom, this.#clockTo);
		return this.#stamps.read(this.#scratch, 0, dateLength + 1 + clockLength);
	}

	#finish(b: Buffer, from: number, to: number): void {
		if (this.#cells === 1 && to - from <= 1 && (to === from || b[from] === CR)) return;
		this.view.line = this.line;
		if (!this.#stamp(b)) this.#odd(b, from, to, 'no-time');
		else if (this.#surplus) this.#odd(b, from, to, 'long');
		else {
			this.view.wall = this.#stamps.out.wall;
			this.view.offset = this.#stamps.out.offset;
			this.#handler.row(this.view);
		}
	}

	#odd(b: Buffer, from: number, to: number, why: 'no-time' | 'long'): void {
		this.#handler.odd(this.line, b.toString('utf8', from, Math.min(to, from + 4000)).replace(/\r$/, ''), why);
	}
}
