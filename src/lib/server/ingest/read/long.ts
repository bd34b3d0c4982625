import { dayOf } from '../time/day';
import type { FilePlan, RawBlock, ReadEvent, ReadSink, TextBlock } from '../types';
import { Dictionary, type RowPlan, type RowView } from '../text/row-plan';
import { BAD_KINDS } from '../values/cell';
import { isSentinel, runStateOf, stateOf } from '../values/words';
import { AlarmColumn } from './alarms';
import { joinRepeats, reorder, risingOrder } from './order';
import { RowClock, type TargetTally } from './quality';
import type { RowTime } from './row-time';
import { isGoodStatus } from './status';
import type { Target } from './targets';

const MOST_ROWS = 20_000;
const DAY = 86_400_000;
const STATUS = BAD_KINDS.indexOf('status');
const SENTINEL = BAD_KINDS.indexOf('sentinel');
const IMPOSSIBLE = BAD_KINDS.indexOf('impossible');
/** Joins the name cells of a long row into the point's name. */
export function pointName(parts: readonly string[]): string {
	return parts.filter((part) => part !== '').join(' ');
}

type Point = {
	target: Target;
	tally: TargetTally;
	clock: RowClock;
	alarm: AlarmColumn | null;
	t: Float64Array;
	v: Float64Array;
	texts: string[];
	n: number;
	day: number;
};

/** Gathers the rows of a long table (time, point, value) into blocks, point by point. */
export class LongRows {
	readonly plan: RowPlan;
	readonly dictionaries: Dictionary[];
	readonly unknown = new Map<string, number>();
	readonly clocks: RowClock[] = [];
	rows = 0;
	readonly #file: FilePlan;
	readonly #fileIndex: number;
	readonly #points = new Map<string, Point>();
	readonly #ignored = new Set<string>();
	readonly #time: RowTime;
	#parts = new Map<string, number>();
	#ready: (RawBlock | TextBlock | ReadEvent)[] = [];
	#names: (Point | null)[] = [];

	constructor(
		file: FilePlan,
		fileIndex: number,
		targets: readonly Target[],
		tallies: readonly TargetTally[],
		time: RowTime
	) {
		this.#file = file;
		this.#fileIndex = fileIndex;
		this.#time = time;
		targets.forEach((target, i) => {
			const clock = new RowClock(target.plan.logging === 'change', file.time.descending);
			this.clocks.push(clock);
			const { unitId, circuit, column } = target.mapping;
			const wordy = target.form === 'text' || target.form === 'alarm';
			this.#points.set(column, {
				target,
				tally: tallies[i] as TargetTally,
				clock,
				alarm: target.form === 'alarm' ? new AlarmColumn(unitId, circuit, column) : null,
				t: new Float64Array(1024),
				v: new Float64Array(wordy ? 0 : 1024),
				texts: [],
				n: 0,
				day: NaN
			});
		});
		for (const column of file.columns) if (!this.#points.has(column.column)) this.#ignored.add(column.column);
		const { roles } = file;
		const words = [...roles.names, roles.value, ...(roles.status >= 0 ? [roles.status] : [])];
		this.dictionaries = words.map(() => new Dictionary());
		const { column, clockColumn, order, year } = file.time;
		this.plan = {
			delimiter: file.delimiter,
			decimal: file.decimal,
			width: file.width,
			time: { column, clockColumn, order, year },
			numbers: [roles.value],
			words
		};
	}

	#point(view: RowView): Point | null {
		const count = this.#file.roles.names.length;
		if (count === 1) {
			const code = view.words[0] ?? -1;
			const known = code < 0 ? null : this.#names[code];
			if (known !== undefined) return known;
			const point = this.#find(this.dictionaries[0]?.list[code] ?? '');
			this.#names[code] = point;
			return point;
		}
		const parts: string[] = [];
		for (let i = 0; i < count; i++) parts.push(this.dictionaries[i]?.list[view.words[i] ?? -1] ?? '');
		return this.#find(pointName(parts));
	}

	#find(name: string): Point | null {
		const point = this.#points.get(name);
		if (point) return point;
		if (!this.#ignored.has(name)) this.unknown.set(name, (this.unknown.get(name) ?? 0) + 1);
		return null;
	}

	/** Takes a row. */
	take(view: RowView): void {
		this.rows++;
		const point = this.#point(view);
		if (!point) return;
		const t = this.#time.at(view.wall, view.offset, view.line, point.target.mapping.column);
		if (Number.isNaN(t)) return;
		point.clock.take(t);
		const day = Math.floor(t / DAY);
		if (point.n >= MOST_ROWS || (day !== point.day && point.n > 0)) this.#flush(point);
		point.day = day;
		if (point.n === point.t.length) this.#grow(point);
		const n = point.n++;
		point.t[n] = t;
		const word =
			this.dictionaries[this.#file.roles.names.length]?.list[view.words[this.#file.roles.names.length] ?? -1] ?? '';
		if (point.target.form === 'text' || point.target.form === 'alarm') {
			const number = view.numbers[0] ?? NaN;
			point.texts[n] = word !== '' || Number.isNaN(number) ? word : String(number);
		} else point.v[n] = this.#figure(point, view, word);
	}

	#figure(point: Point, view: RowView, word: string): number {
		const status = view.words[this.#file.roles.names.length + 1] ?? -1;
		if (status >= 0 && this.#file.roles.status >= 0) {
			const text = this.dictionaries[this.#file.roles.names.length + 1]?.list[status] ?? '';
			if (!isGoodStatus(text)) {
				point.tally.note(STATUS, view.line);
				return NaN;
			}
		}
		const { target, tally } = point;
		let x = view.numbers[0] ?? NaN;
		const bad = view.bad[0] ?? 0;
		if (bad > 0) {
			const state = target.form !== 'state' ? NaN : target.signal === 'running' ? runStateOf(word) : stateOf(word);
			if (Number.isNaN(state)) tally.note(bad - 1, view.line);
			x = state;
		}
		if (Number.isNaN(x)) return NaN;
		const stored = x * target.scale.factor + target.scale.offset;
		if (stored >= target.least && stored <= target.most && (target.form !== 'state' || stored === 0 || stored === 1))
			return stored;
		tally.note(isSentinel(x) ? SENTINEL : IMPOSSIBLE, view.line);
		return NaN;
	}

	#grow(point: Point): void {
		const size = Math.min(MOST_ROWS, point.t.length * 2);
		const t = new Float64Array(size);
		t.set(point.t);
		point.t = t;
		if (point.v.length === 0) return;
		const v = new Float64Array(size);
		v.set(point.v);
		point.v = v;
	}

	#flush(point: Point): void {
		const n = point.n;
		point.n = 0;
		if (n === 0) return;
		const { target, tally } = point;
		const raw = point.t.subarray(0, n);
		const order = risingOrder(raw, n);
		const base = {
			unitId: target.mapping.unitId,
			circuit: target.mapping.circuit,
			signal: target.series,
			fileIndex: this.#fileIndex
		};
		if (target.form === 'text' || target.form === 'alarm') {
			this.#flushText(point, order, n, base);
			return;
		}
		const joined = order ? joinRepeats(raw, order) : { t: raw.slice(), slot: new Uint32Array(0) };
		const v = order ? reorder(point.v, order, joined.slot, joined.t.length) : point.v.slice(0, n);
		if (v.every(Number.isNaN)) return;
		tally.cover(joined.t, v);
		this.#ready.push({
			...base,
			...this.#place(target, joined.t[0] ?? NaN),
			t: joined.t,
			v,
			logging: target.plan.logging,
			increment: target.increment,
			measure: target.measure,
			scale: target.scale
		});
	}

	#flushText(
		point: Point,
		order: Uint32Array | null,
		n: number,
		base: Pick<TextBlock, 'unitId' | 'circuit' | 'signal' | 'fileIndex'>
	): void {
		const t: number[] = [];
		const text: string[] = [];
		for (let k = 0; k < n; k++) {
			const i = order ? (order[k] ?? k) : k;
			const at = point.t[i] ?? NaN;
			let word = point.texts[i] ?? '';
			point.tally.samples++;
			if (point.alarm) {
				const said = point.alarm.take(at, word);
				word = said.text;
				if (said.event) this.#ready.push(said.event);
			}
			if (word === text.at(-1)) continue;
			if (t.at(-1) === at) text[text.length - 1] = word;
			else {
				t.push(at);
				text.push(word);
			}
		}
		this.#ready.push({ ...base, ...this.#place(point.target, t[0] ?? NaN), t: Float64Array.from(t), text });
	}

	#place(target: Target, t: number): { day: string; part: number } {
		const day = dayOf(t);
		const id = `${target.mapping.unitId}|${target.mapping.circuit}|${target.series}|${day}`;
		const part = this.#parts.get(id) ?? 0;
		this.#parts.set(id, part + 1);
		return { day, part };
	}

	/** Turns everything gathered into blocks. */
	flush(): void {
		for (const point of this.#points.values()) this.#flush(point);
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
}
