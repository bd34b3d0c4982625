import { lowerBound, type Readings } from './trace-path';

export type Sample = { index: number; at: number; value: number };

/**
 * The stored reading a cursor shows. Change-of-value traces hold their last record, up to a break; others give the
 * reading nearest to `at`, at most `reach` ms away. Gap rule: a break (NaN) between the reading and `at` hides it.
 * @param at ms UTC
 * @param reach ms; how far a reading may lie from the cursor and still speak for it (one local spacing)
 * @returns null when there is no reading there
 */
export function nearestSample(readings: Readings, at: number, hold: boolean, reach: number): Sample | null {
	const { t, v } = readings;
	const after = lowerBound(t, at);
	const read = (index: number): Sample | null => {
		const value = v[index];
		const when = t[index];
		return value === undefined || when === undefined || Number.isNaN(value) ? null : { index, at: when, value };
	};
	const here = read(after);
	if (here !== null && here.at === at) return here;
	const before = read(after - 1);
	if (hold) return before;
	const usable = (sample: Sample | null): sample is Sample => sample !== null && Math.abs(sample.at - at) <= reach;
	if (usable(before) && usable(here)) return at - before.at <= here.at - at ? before : here;
	if (usable(before)) return before;
	return usable(here) ? here : null;
}

/** Median time between the readings within `around` ms of an instant; the whole trace's when there are too few. */
export function localSpacing(t: ArrayLike<number>, at: number, around = 300_000): number {
	let begin = lowerBound(t, at - around);
	let end = lowerBound(t, at + around);
	if (end - begin < 3) [begin, end] = [0, t.length];
	const steps: number[] = [];
	for (let i = begin + 1; i < end; i++) steps.push((t[i] ?? 0) - (t[i - 1] ?? 0));
	steps.sort((a, b) => a - b);
	return steps[steps.length >> 1] ?? 0;
}

/**
 * The reading one step on in a list of instants; stays at the ends.
 * @param direction how many readings, negative for back
 */
export function stepSample(t: ArrayLike<number>, at: number, direction: number): number {
	if (t.length === 0) return at;
	const after = lowerBound(t, at);
	const on = t[after] === at;
	const index = direction > 0 ? after + direction - (on ? 0 : 1) : after + direction;
	return t[Math.max(0, Math.min(t.length - 1, index))] ?? at;
}

/** The instant of a list nearest to `at`; `at` itself when the list is empty. */
export function snapTo(t: ArrayLike<number>, at: number): number {
	const after = lowerBound(t, at);
	const here = t[after];
	const before = t[after - 1];
	if (here === undefined) return before ?? at;
	if (before === undefined) return here;
	return at - before <= here - at ? before : here;
}
