/**
 * Quantile 0…1 of finite values by linear interpolation between order statistics (Hyndman and Fan's type 7).
 * The values are copied, NaN left out. @returns null for no value
 */
export function quantile(values: ArrayLike<number>, q: number): number | null {
	const kept = finite(values);
	if (kept.length === 0) return null;
	kept.sort();
	const place = (kept.length - 1) * q;
	const below = Math.floor(place);
	const low = kept[below] ?? NaN;
	const high = kept[Math.min(below + 1, kept.length - 1)] ?? NaN;
	return low + (high - low) * (place - below);
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

/**
 * Theil–Sen slope: the median of the slopes between all pairs (Sen 1968), in units of `y` a unit of `x`.
 * Above 300 points every k-th is taken, so that a start costs at most 45,000 pairs.
 * @returns null for fewer than two distinct x
 */
export function theilSen(x: ArrayLike<number>, y: ArrayLike<number>): number | null {
	const step = Math.ceil(x.length / 300);
	const slopes: number[] = [];
	for (let i = 0; i < x.length; i += step) {
		for (let j = i + step; j < x.length; j += step) {
			const dx = (x[j] ?? NaN) - (x[i] ?? NaN);
			if (dx !== 0) slopes.push(((y[j] ?? NaN) - (y[i] ?? NaN)) / dx);
		}
	}
	return median(slopes);
}
