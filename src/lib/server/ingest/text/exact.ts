import { StampReader } from '../time/stamp';
import type { TextRow } from './papa';
import { BLANK, SlowCells, type Dictionary, type RowHandler, type RowPlan, type RowView } from './row-plan';

/** Reads rows from cells cut by PapaParse, with the very rules of the scanner: what both can read, both read alike. */
export class ExactRows {
	readonly view: RowView;
	readonly #plan: RowPlan;
	readonly #handler: RowHandler;
	readonly #dictionaries: Dictionary[];
	readonly #stamps: StampReader;
	readonly #slow: SlowCells;

	constructor(plan: RowPlan, handler: RowHandler, dictionaries: Dictionary[]) {
		this.#plan = plan;
		this.#handler = handler;
		this.#dictionaries = dictionaries;
		this.#stamps = new StampReader(plan.time.order, plan.time.year);
		this.#slow = new SlowCells(plan.decimal);
		this.view = {
			line: 0,
			wall: NaN,
			offset: NaN,
			numbers: new Float64Array(plan.numbers.length),
			bad: new Uint8Array(plan.numbers.length),
			words: new Int32Array(plan.words.length)
		};
	}

	take(row: TextRow): void {
		const { view } = this;
		const plan = this.#plan;
		const { cells } = row;
		const text = (column: number) => cells[column] ?? '';
		const { column, clockColumn } = plan.time;
		const stamp = clockColumn < 0 ? text(column) : `${text(column)} ${text(clockColumn)}`;
		const clockThere = clockColumn < 0 || text(clockColumn) !== '';
		if (!clockThere || !this.#stamps.readText(stamp)) {
			this.#handler.odd(row.line, cells.join(plan.delimiter).slice(0, 4000), 'no-time');
			return;
		}
		if (cells.length > plan.width && cells.slice(plan.width).some((cell) => cell.trim() !== '')) {
			this.#handler.odd(row.line, cells.join(plan.delimiter).slice(0, 4000), 'long');
			return;
		}
		view.line = row.line;
		view.wall = this.#stamps.out.wall;
		view.offset = this.#stamps.out.offset;
		plan.numbers.forEach((at, slot) => {
			const cell = text(at).trim();
			const read = cell === '' ? { value: NaN, bad: BLANK } : this.#slow.read(cell);
			view.numbers[slot] = read.value;
			view.bad[slot] = read.bad;
		});
		plan.words.forEach((at, slot) => {
			const number = plan.numbers.indexOf(at);
			const wanted = number < 0 || view.bad[number] !== 0;
			view.words[slot] = wanted ? (this.#dictionaries[slot]?.code(text(at)) ?? -1) : -1;
		});
		this.#handler.row(view);
	}
}
