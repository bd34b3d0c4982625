/**
 * Quantile 0…1 of finite values by linear interpolation between order statistics (Hyndman and Fan's type 7).
 * The values are copied, NaN left out. @returns null for no value
 */
export function quantile(values: ArrayLike<number>, q: number): number | null {
	const kept = finite(values);
	if (kept.length === 0) return null;
	const place = (kept.length - 1) * q;
	const below = Math.floor(place);
	const low = select(kept, below);
	if (place === below) return low;
	// After the selection everything past `below` is no smaller: the next order statistic is the least of it.
	let high = Infinity;
	for (let i = below + 1; i < kept.length; i++) high = Math.min(high, kept[i] ?? NaN);
	return low + (high - low) * (place - below);
}

/** The k-th smallest (from 0), by Hoare's selection in place: linear on average where a sort is not. */
function select(values: Float64Array, k: number): number {
	let left = 0;
	let right = values.length - 1;
	while (left < right) {
		const pivot = values[(left + right) >> 1] ?? NaN;
		let i = left;
		let j = right;
		while (i <= j) {
			while ((values[i] ?? NaN) < pivot) i++;
			while ((values[j] ?? NaN) > pivot) j--;
			if (i > j) break;
			const swapped = values[i] ?? NaN;
			values[i++] = values[j] ?? NaN;
			values[j--] = swapped;
		}
		if (k <= j) right = j;
		else if (k >= i) left = i;
		else break;
	}
	return values[k] ?? NaN;
}

function finite(values: ArrayLike<number>): Float64Array {
	const kept = new Float64Array(values.length);
	let count = 0;
	for (let i = 0; i < values.length; i++) {
		const v = values[i] ?? NaN;
		if (!Number.isNaN(v)) kept[count++] = v;
	}
	return kept.subarray(0, count);
}

/** Middle value, the mean of the two middle ones when even; NaN left out. @returns null for no value */
export function median(values: ArrayLike<number>): number | null {
	return quantile(values, 0.5);
}

/** Median absolute deviation from the median, unscaled. @returns null for no value */
export function medianDeviation(values: ArrayLike<number>): number | null {
	const middle = median(values);
	return middle === null ? null : median(Float64Array.from(values, (v) => Math.abs(v - middle)));
}

/** A quantile of at most `most` values taken at even steps: for thresholds over long columns. null for no value */
export function sampledQuantile(values: ArrayLike<number>, q: number, most = 20_000): number | null {
	const kept = finite(values);
	if (kept.length <= most) return quantile(kept, q);
	const step = kept.length / most;
	const thinned = new Float64Array(most);
	for (let i = 0; i < most; i++) thinned[i] = kept[Math.floor(i * step)] ?? NaN;
	return quantile(thinned, q);
}

/** More points than this are thinned to every k-th: 20,000 pairs settle a median. */
const MOST_POINTS = 200;

/**
 * Theil–Sen slope: the median of the slopes between all pairs (Sen 1968), in units of `y` a unit of `x`. Above 200
 * points every k-th is taken.
 * @returns null for fewer than two distinct x
 */
export function theilSen(x: ArrayLike<number>, y: ArrayLike<number>): number | null {
	const step = Math.ceil(x.length / MOST_POINTS);
	const points = step === 0 ? 0 : Math.ceil(x.length / step);
	const slopes = new Float64Array((points * (points - 1)) / 2);
	let count = 0;
	for (let i = 0; i < x.length; i += step) {
		for (let j = i + step; j < x.length; j += step) {
			const dx = (x[j] ?? NaN) - (x[i] ?? NaN);
			if (dx !== 0) slopes[count++] = ((y[j] ?? NaN) - (y[i] ?? NaN)) / dx;
		}
	}
	return median(slopes.subarray(0, count));
}
