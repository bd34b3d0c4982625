import type { Problem, Quality, SignalQuality } from '../types';
import { BAD_KINDS } from '../values/cell';
import type { Target } from './targets';

const MOST_PROBLEMS = 200;
const MOST_STRETCHES = 400;

/** Problems with their places, capped; what is left out is counted by kind. */
export class ProblemList {
	readonly list: Problem[] = [];
	#over = new Map<string, number>();
	#byKind = new Map<string, number>();

	add(problem: Problem): void {
		const n = (this.#byKind.get(problem.kind) ?? 0) + 1;
		this.#byKind.set(problem.kind, n);
		// No single kind may crowd the others out.
		if (n > 40 || this.list.length >= MOST_PROBLEMS)
			this.#over.set(problem.kind, (this.#over.get(problem.kind) ?? 0) + 1);
		else this.list.push(problem);
	}

	/** The list, with a last line a kind for what was left out. */
	all(): Problem[] {
		const rest = [...this.#over].map(([kind, n]) => ({
			file: '',
			line: null,
			column: null,
			kind,
			message: `and ${n} more of this kind.`
		}));
		return [...this.list, ...rest];
	}
}

/** Gaps and span of one file's rows, from their times in order. A gap is over max(3 × the steps around it, 60 s). */
export class RowClock {
	gaps = 0;
	longest = 0;
	gapSeconds = 0;
	first = Infinity;
	last = -Infinity;
	repeats = 0;
	outOfOrder = 0;
	rows = 0;
	readonly #changes: boolean;
	readonly #direction: number;
	#before = NaN;
	#step = NaN;
	#pending = NaN;

	/** @param changes rows are logged on change: silence is no gap */
	constructor(changes: boolean, descending: boolean) {
		this.#changes = changes;
		this.#direction = descending ? -1 : 1;
	}

	take(t: number): void {
		this.rows++;
		if (t < this.first) this.first = t;
		if (t > this.last) this.last = t;
		const step = ((t - this.#before) * this.#direction) / 1000;
		if (step === 0) this.repeats++;
		else if (step < 0) this.outOfOrder++;
		if (step > 0) {
			this.#judge(step);
			this.#step = Number.isNaN(this.#pending) ? step : this.#step;
		}
		if (!(step < 0)) this.#before = t;
	}

	/** A long step is a gap only when the step after it is short again: a logger that slows down makes no gap. */
	#judge(next: number): void {
		if (this.#changes) return;
		if (!Number.isNaN(this.#pending)) {
			const around = Math.max(this.#step, next);
			if (this.#pending > Math.max(3 * around, 60)) {
				this.gaps++;
				this.gapSeconds += this.#pending - around;
				if (this.#pending > this.longest) this.longest = this.#pending;
			}
			this.#step = next;
			this.#pending = NaN;
		}
		if (next > Math.max(3 * this.#step, 60)) this.#pending = next;
	}
}

/** Counts of one target: readings, what was no reading and where first. */
export class TargetTally {
	readonly target: Target;
	readonly fileIndex: number;
	samples = 0;
	readonly bad = new Float64Array(BAD_KINDS.length);
	readonly firstLine = new Float64Array(BAD_KINDS.length).fill(NaN);
	readonly covered: { from: number; to: number }[] = [];
	#join = 300_000;

	constructor(target: Target, fileIndex: number, intervalSeconds: number | null) {
		this.target = target;
		this.fileIndex = fileIndex;
		this.#join = Math.max(300_000, (intervalSeconds ?? 60) * 3000);
		if (target.plan.logging === 'change') this.#join = 6 * 3_600_000;
	}

	note(kind: number, line: number): void {
		this.bad[kind] = (this.bad[kind] ?? 0) + 1;
		if (Number.isNaN(this.firstLine[kind])) this.firstLine[kind] = line;
	}

	/** Adds readings of a block, times rising, to the stretches covered. */
	cover(t: Float64Array, v: Float64Array): void {
		let from = NaN;
		let to = NaN;
		let n = 0;
		for (let i = 0; i < t.length; i++) {
			const x = v[i] as number;
			if (x !== x) continue;
			const at = t[i] as number;
			n++;
			// A first reading, and one after a hole: `at - NaN` compares false.
			if (!(at - to <= this.#join)) {
				this.#stretch(from, to);
				from = at;
			}
			to = at;
		}
		this.samples += n;
		this.#stretch(from, to);
		if (this.covered.length > MOST_STRETCHES) this.#coarsen();
	}

	#stretch(from: number, to: number): void {
		if (Number.isNaN(from)) return;
		const last = this.covered.at(-1);
		if (last && from >= last.from && from - last.to <= this.#join) last.to = Math.max(last.to, to);
		else this.covered.push({ from, to });
	}

	#coarsen(): void {
		this.#join *= 4;
		const sorted = this.covered.sort((a, b) => a.from - b.from);
		const merged: { from: number; to: number }[] = [];
		for (const s of sorted) {
			const last = merged.at(-1);
			if (last && s.from - last.to <= this.#join) last.to = Math.max(last.to, s.to);
			else merged.push({ ...s });
		}
		this.covered.splice(0, this.covered.length, ...merged);
	}

	quality(spacingSeconds: number | null): SignalQuality {
		const { mapping, series, plan } = this.target;
		return {
			unitId: mapping.unitId,
			circuit: mapping.circuit,
			signal: series,
			column: mapping.column,
			samples: this.samples,
			bad: this.bad.reduce((a, b) => a + b, 0),
			spacingSeconds,
			logging: plan.logging,
			notes: [],
			covered: [...this.covered].sort((a, b) => a.from - b.from)
		};
	}
}

const KIND_WORDS: Readonly<Record<string, string>> = {
	word: 'are words instead of a reading',
	sentinel: 'are numbers that loggers write for "no reading"',
	impossible: 'are impossible for it',
	unreadable: 'cannot be read',
	formula: 'are spreadsheet formulas',
	status: 'are marked as bad by their status'
};

/** One problem a column and kind, with the first line and the count. Blanks and dashes are counted only. */
export function tallyProblems(tallies: readonly TargetTally[], fileOf: (i: number) => string): Problem[] {
	const problems: Problem[] = [];
	for (const tally of tallies) {
		for (const [i, kind] of BAD_KINDS.entries()) {
			const n = tally.bad[i] ?? 0;
			const words = KIND_WORDS[kind];
			if (n === 0 || !words) continue;
			const line = tally.firstLine[i] ?? NaN;
			problems.push({
				file: fileOf(tally.fileIndex),
				line: Number.isNaN(line) ? null : line,
				column: tally.target.mapping.column,
				kind: `value-${kind}`,
				message: `${n} ${n === 1 ? 'cell' : 'cells'} of "${tally.target.mapping.column}" ${words}; they count as no reading.`
			});
		}
	}
	return problems;
}

/** Quality of a whole log from its files' clocks and tallies. */
export function totalQuality(clocks: readonly RowClock[], tallies: readonly TargetTally[], badTimes: number): Quality {
	const badValues: Record<string, number> = {};
	for (const [i, kind] of BAD_KINDS.entries()) {
		const n = tallies.reduce((sum, tally) => sum + (tally.bad[i] ?? 0), 0) + (kind === 'time' ? badTimes : 0);
		if (n > 0) badValues[kind] = n;
	}
	const used = clocks.filter((c) => c.rows > 0);
	const sum = (of: (c: RowClock) => number) => used.reduce((s, c) => s + of(c), 0);
	const span = sum((c) => (c.last - c.first) / 1000);
	return {
		gaps: sum((c) => c.gaps),
		longestGapSeconds: Math.max(0, ...used.map((c) => c.longest)),
		repeats: sum((c) => c.repeats),
		outOfOrder: sum((c) => c.outOfOrder),
		badValues,
		coverage: span > 0 ? Math.max(0, Math.min(1, 1 - sum((c) => c.gapSeconds) / span)) : used.length > 0 ? 1 : 0
	};
}
