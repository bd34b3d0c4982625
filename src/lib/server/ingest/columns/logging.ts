import type { ColumnSample } from './sample';

/** Share of steps that belong to the three commonest lengths: a logger on a clock, one that slows down at rest included. */
function regularity(steps: readonly number[]): number {
	const counts = new Map<number, number>();
	for (const step of steps) {
		const rounded = step < 10_000 ? Math.round(step / 500) : Math.round(step / 2000) * 4;
		counts.set(rounded, (counts.get(rounded) ?? 0) + 1);
	}
	const top = [...counts.values()].sort((a, b) => b - a).slice(0, 3);
	return top.reduce((a, b) => a + b, 0) / steps.length;
}

/**
 * Is a column logged at an interval, or only when its value changed? On change: no regular steps between its records,
 * and neighbouring records hardly ever equal. `wide` columns are judged by their cells that are not blank.
 */
export function loggingOf(sample: ColumnSample): 'interval' | 'change' {
	const t: number[] = [];
	const v: (number | string)[] = [];
	const rows = Math.min(sample.headRows, sample.t.length);
	for (let i = 0; i < rows; i++) {
		const cell = sample.cells[i]?.trim() ?? '';
		if (cell === '') continue;
		t.push(sample.t[i] ?? NaN);
		v.push(Number.isNaN(sample.v[i]) ? cell : (sample.v[i] ?? NaN));
	}
	if (t.length < 6) {
		// Nearly always blank in a table that goes on: written only when it changed.
		return rows > 40 && t.length > 0 && t.length < 0.1 * rows ? 'change' : 'interval';
	}
	const steps = t.slice(1).map((x, i) => Math.abs(x - (t[i] ?? NaN)));
	const repeats = v.slice(1).filter((x, i) => x === v[i]).length / steps.length;
	const blank = 1 - t.length / rows;
	if (blank > 0.5 && repeats < 0.1) return 'change';
	return regularity(steps.filter((s) => s > 0)) < 0.7 && repeats < 0.1 ? 'change' : 'interval';
}

/** Are a file's rows written when something changed, and not on a clock? Then every column of it is. */
export function rowsOnChange(times: readonly number[]): boolean {
	const steps = times
		.slice(1)
		.map((x, i) => Math.abs(x - (times[i] ?? NaN)))
		.filter((s) => s > 0);
	return steps.length >= 20 && regularity(steps) < 0.5;
}

/** Usual time between a column's records, s: the median of the head's steps. */
export function spacingOf(sample: ColumnSample): number | null {
	const t: number[] = [];
	for (let i = 0; i < Math.min(sample.headRows, sample.t.length); i++) {
		if ((sample.cells[i]?.trim() ?? '') !== '') t.push(sample.t[i] ?? NaN);
	}
	const steps = t
		.slice(1)
		.map((x, i) => Math.abs(x - (t[i] ?? NaN)) / 1000)
		.filter((s) => s > 0)
		.sort((a, b) => a - b);
	return steps[Math.floor(steps.length / 2)] ?? null;
}
