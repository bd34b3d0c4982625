/**
 * Index of the first instant at or after `at` (ms UTC) in rising times; `t.length` when there is none. O(log n).
 */
export function firstAtOrAfter(t: ArrayLike<number>, at: number): number {
	let low = 0;
	let high = t.length;
	while (low < high) {
		const middle = (low + high) >> 1;
		if ((t[middle] ?? Infinity) < at) low = middle + 1;
		else high = middle;
	}
	return low;
}

/** Index of the last instant at or before `at` (ms UTC) in rising times; −1 when there is none. O(log n). */
export function lastAtOrBefore(t: ArrayLike<number>, at: number): number {
	let low = 0;
	let high = t.length;
	while (low < high) {
		const middle = (low + high) >> 1;
		if ((t[middle] ?? Infinity) <= at) low = middle + 1;
		else high = middle;
	}
	return low - 1;
}
