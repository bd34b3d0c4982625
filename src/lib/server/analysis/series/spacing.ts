import type { Series } from '$lib/model/series';
import { median } from './numbers';
import { firstAtOrAfter, lastAtOrBefore } from './search';

const NEIGHBOURS = 5;

/** Gaps in ms between readings on one side of index `i` (`step` −1 or 1), nearest first, blanks skipped. */
function gapsBeside(series: Series, i: number, step: 1 | -1): number[] {
	const gaps: number[] = [];
	let last = NaN;
	// A column that is mostly blank must not make this walk long.
	for (
		let j = i, seen = 0;
		j >= 0 && j < series.t.length && gaps.length < NEIGHBOURS && seen < 200;
		j += step, seen++
	) {
		if (Number.isNaN(series.v[j] ?? NaN)) continue;
		const at = series.t[j] ?? NaN;
		if (!Number.isNaN(last)) gaps.push(Math.abs(at - last));
		last = at;
	}
	return gaps;
}

/**
 * Local spacing of a signal's readings around an instant, seconds: the median of the five gaps on either side.
 * Blanks count as no reading. @returns null with fewer than two readings near
 */
export function localSpacing(series: Series, at: number): number | null {
	const i = lastAtOrBefore(series.t, at);
	const gaps = [...gapsBeside(series, i < 0 ? 0 : i, -1), ...gapsBeside(series, Math.max(i, 0), 1)];
	const middle = median(gaps);
	return middle === null ? null : middle / 1000;
}

/**
 * Typical spacing of a signal's readings between two instants (ms, inclusive), seconds. null with fewer than two
 */
export function spacingWithin(series: Series, from: number, to: number): number | null {
	const gaps: number[] = [];
	let last = NaN;
	const end = lastAtOrBefore(series.t, to);
	for (let i = firstAtOrAfter(series.t, from); i <= end; i++) {
		if (Number.isNaN(series.v[i] ?? NaN)) continue;
		const at = series.t[i] ?? NaN;
		if (!Number.isNaN(last)) gaps.push(at - last);
		last = at;
	}
	const middle = median(gaps);
	return middle === null ? null : middle / 1000;
}

/**
 * Is the stretch between reading `i − 1` and `i` of rising times a gap: over max(3 × local spacing, 60 s)?
 * Local spacing: the wider of the medians of the five gaps before and after, so that a logger that changes its pace
 * (fast while running, slow while off) makes no gap at the change.
 */
export function isGapBefore(t: ArrayLike<number>, i: number): boolean {
	const length = (t[i] ?? NaN) - (t[i - 1] ?? NaN);
	if (!(length > 60_000)) return false;
	const before: number[] = [];
	for (let j = i - 1; j > 0 && before.length < NEIGHBOURS; j--) before.push((t[j] ?? NaN) - (t[j - 1] ?? NaN));
	const after: number[] = [];
	for (let j = i + 1; j < t.length && after.length < NEIGHBOURS; j++) after.push((t[j] ?? NaN) - (t[j - 1] ?? NaN));
	const local = Math.max(median(before) ?? 0, median(after) ?? 0);
	return length > Math.max(3 * local, 60_000);
}
