import { dayOf } from '../time/day';
import type { FilePlan, ReadEvent, ReadSink, RawBlock, TextBlock } from '../types';
import { Dictionary, type RowPlan, type RowView } from '../text/row-plan';
import { BAD_KINDS } from '../values/cell';
import { isSentinel, runStateOf, stateOf } from '../values/words';
import { AlarmColumn } from './alarms';
import { joinRepeats, reorder, risingOrder } from './order';
import type { RowClock, TargetTally } from './quality';
import { isGoodStatus } from './status';
import type { Target } from './targets';

/** Rows of one block at most: a day at 5 s with room. */
const MOST_ROWS = 20_000;
const SENTINEL = BAD_KINDS.indexOf('sentinel');
const IMPOSSIBLE = BAD_KINDS.indexOf('impossible');
const STATUS = BAD_KINDS.indexOf('status');
const DAY = 86_400_000;

type Column = {
	target: Target;
	tally: TargetTally;
	/** Slots in the row's numbers and words; −1 = none. */
	number: number;
	word: number;
	values: Float64Array;
	texts: Int32Array | null;
	/** Figure of each word of the dictionary: 1, 0 or NaN. */
	states: number[];
	alarm: AlarmColumn | null;
};

/** Gathers rows of a wide table into blocks of one UTC day, each signal its own, all sharing their times. */
export class WideRows {
	readonly plan: RowPlan;
	readonly dictionaries: Dictionary[];
	readonly #file: FilePlan;
	readonly #fileIndex: number;
	readonly #columns: Column[];
	/** Columns of numbers only, and those in which words count. */
	readonly #plain: Column[];
	readonly #wordy: Column[];
	readonly #clock: RowClock;
	/** Slot of the word that says whether the row's one reading counts; −1 without. */
	readonly #status: number;
	#t = new Float64Array(MOST_ROWS);
	#lines = new Float64Array(MOST_ROWS);
	#n = 0;
	#day = NaN;
	#parts = new Map<string, number>();
	#ready: (RawBlock | TextBlock | ReadEvent)[] = [];

	constructor(
		file: FilePlan,
		fileIndex: number,
		targets: readonly Target[],
		tallies: readonly TargetTally[],
		clock: RowClock
	) {
		this.#file = file;
		this.#fileIndex = fileIndex;
		this.#clock = clock;
		const numbers: number[] = [];
		const words: number[] = [];
		this.#columns = targets.map((target, i) => {
			const wordy = target.form !== 'number';
			const column: Column = {
				target,
				tally: tallies[i] as TargetTally,
				number: target.form === 'text' || target.form === 'alarm' ? -1 : numbers.push(target.plan.index) - 1,
				word: wordy ? words.push(target.plan.index) - 1 : -1,
				values: new Float64Array(target.form === 'text' || target.form === 'alarm' ? 0 : MOST_ROWS),
				texts: target.form === 'text' || target.form === 'alarm' ? new Int32Array(MOST_ROWS) : null,
				states: [],
				alarm:
					target.form === 'alarm'
						? new AlarmColumn(target.mapping.unitId, target.mapping.circuit, target.mapping.column)
						: null
			};
			return column;
		});
		this.#plain = this.#columns.filter((column) => column.word < 0);
		this.#wordy = this.#columns.filter((column) => column.word >= 0);
		const { status } = file.roles;
		this.#status = file.kind === 'per-signal' && status >= 0 ? words.push(status) - 1 : -1;
		this.dictionaries = words.map(() => new Dictionary());
		const { column, clockColumn, order, year } = file.time;
		this.plan = {
			delimiter: file.delimiter,
			decimal: file.decimal,
			width: file.width,
			time: { column, clockColumn, order, year },
			numbers,
			words
		};
	}

	/** Takes a row at its instant (ms UTC). */
	take(t: number, view: RowView): void {
		this.#clock.take(t);
		const day = Math.floor(t / DAY);
		if (this.#n === MOST_ROWS || (day !== this.#day && this.#n > 0)) this.flush();
		this.#day = day;
		const n = this.#n++;
		this.#t[n] = t;
		this.#lines[n] = view.line;
		const { numbers, bad } = view;
		const plain = this.#plain;
		for (let k = 0; k < plain.length; k++) {
			const column = plain[k] as Column;
			const slot = column.number;
			column.values[n] = numbers[slot] as number;
			if (bad[slot] !== 0) column.tally.note((bad[slot] as number) - 1, view.line);
		}
		for (const column of this.#wordy) {
			if (column.texts) column.texts[n] = view.words[column.word] ?? -1;
			else column.values[n] = this.#figure(column, view);
		}
		if (this.#status >= 0) this.#judge(n, view);
	}

	/** One signal a file with its status: a bad one makes the reading none. */
	#judge(n: number, view: RowView): void {
		const word = this.dictionaries[this.#status]?.list[view.words[this.#status] ?? -1] ?? '';
		if (isGoodStatus(word)) return;
		for (const column of this.#columns) {
			if (column.texts) continue;
			column.values[n] = NaN;
			column.tally.note(STATUS, view.line);
		}
	}

	#figure(column: Column, view: RowView): number {
		const x = view.numbers[column.number] ?? NaN;
		const bad = view.bad[column.number] ?? 0;
		if (bad === 0) return x;
		const code = view.words[column.word] ?? -1;
		const state = code < 0 ? NaN : this.#state(column, code);
		if (Number.isNaN(state)) column.tally.note(bad - 1, view.line);
		return state;
	}

	#state(column: Column, code: number): number {
		let state = column.states[code];
		if (state === undefined) {
			const word = this.dictionaries[column.word]?.list[code] ?? '';
			state = column.target.signal === 'running' ? runStateOf(word) : stateOf(word);
			column.states[code] = state;
		}
		return state;
	}

	/** Turns the gathered rows into blocks. */
	flush(): void {
		const n = this.#n;
		this.#n = 0;
		if (n === 0) return;
		const raw = this.#t.subarray(0, n);
		const order = risingOrder(raw, n);
		const joined = order ? joinRepeats(raw, order) : { t: raw.slice(), slot: new Uint32Array(0) };
		for (const column of this.#columns) {
			if (column.texts) this.#texts(column, order, n);
			else {
				this.#convert(column, n);
				const v = order ? reorder(column.values, order, joined.slot, joined.t.length) : column.values.slice(0, n);
				this.#block(column, joined.t, v);
			}
		}
	}

	/** File's figures to stored units; what no working sensor reads becomes no reading. */
	#convert(column: Column, n: number): void {
		const { values, target, tally } = column;
		const { least, most, scale, form } = target;
		const { factor, offset } = scale;
		for (let i = 0; i < n; i++) {
			const x = values[i] ?? NaN;
			if (Number.isNaN(x)) continue;
			const stored = x * factor + offset;
			if (stored >= least && stored <= most && (form !== 'state' || stored === 0 || stored === 1)) values[i] = stored;
			else {
				values[i] = NaN;
				tally.note(isSentinel(x) ? SENTINEL : IMPOSSIBLE, this.#lines[i] ?? NaN);
			}
		}
	}

	#block(column: Column, t: Float64Array, v: Float64Array): void {
		const { target, tally } = column;
		let [times, values] = [t, v];
		if (target.plan.logging === 'change') [times, values] = withoutBlanks(t, v);
		if (times.length === 0 || values.every(Number.isNaN)) return;
		tally.cover(times, values);
		this.#ready.push({
			unitId: target.mapping.unitId,
			circuit: target.mapping.circuit,
			signal: target.series,
			fileIndex: this.#fileIndex,
			...this.#place(target.series + target.mapping.circuit + target.mapping.unitId, times[0] ?? NaN),
			t: times,
			v: values,
			logging: target.plan.logging,
			increment: target.increment,
			measure: target.measure,
			scale: target.scale
		});
	}

	#place(key: string, t: number): { day: string; part: number } {
		const day = dayOf(t);
		const id = `${key}|${day}`;
		const part = this.#parts.get(id) ?? 0;
		this.#parts.set(id, part + 1);
		return { day, part };
	}

	/** Words: the first of the block and every change; an alarm column's changes are events too. */
	#texts(column: Column, order: Uint32Array | null, n: number): void {
		const { target, tally } = column;
		const list = this.dictionaries[column.word]?.list ?? [];
		const t: number[] = [];
		const text: string[] = [];
		let before: string | null = null;
		for (let k = 0; k < n; k++) {
			const i = order ? (order[k] ?? k) : k;
			const at = this.#t[i] ?? NaN;
			let word = list[column.texts?.[i] ?? -1] ?? '';
			tally.samples++;
			if (column.alarm) {
				const said = column.alarm.take(at, word);
				word = said.text;
				if (said.event) this.#ready.push(said.event);
			}
			if (word === before) continue;
			if (t.at(-1) === at) text[text.length - 1] = word;
			else {
				t.push(at);
				text.push(word);
			}
			before = word;
		}
		this.#ready.push({
			unitId: target.mapping.unitId,
			circuit: target.mapping.circuit,
			signal: target.series,
			fileIndex: this.#fileIndex,
			...this.#place(target.series + target.mapping.circuit + target.mapping.unitId, t[0] ?? NaN),
			t: Float64Array.from(t),
			text
		});
	}

	/** Passes on what is ready. */
	async drain(sink: ReadSink): Promise<void> {
		const ready = this.#ready;
		this.#ready = [];
		for (const item of ready) {
			if ('v' in item) await sink.block(item);
			else if ('at' in item) await sink.event(item);
			else await sink.text(item);
		}
	}

	/** The file's plan, for messages. */
	get file(): FilePlan {
		return this.#file;
	}
}

/** A column logged on change says nothing by its blanks: only its readings stay. */
function withoutBlanks(t: Float64Array, v: Float64Array): [Float64Array, Float64Array] {
	const kept = v.reduce((n, x) => (Number.isNaN(x) ? n : n + 1), 0);
	if (kept === v.length) return [t, v];
	const times = new Float64Array(kept);
	const values = new Float64Array(kept);
	for (let i = 0, k = 0; i < v.length; i++) {
		const x = v[i] ?? NaN;
		if (Number.isNaN(x)) continue;
		times[k] = t[i] ?? NaN;
		values[k++] = x;
	}
	return [times, values];
}
