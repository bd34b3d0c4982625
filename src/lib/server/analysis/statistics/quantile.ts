import { sortedFinite } from './finite';

/**
 * Sample quantile by linear interpolation between order statistics: position h = (n − 1)·p.
 * Readings that are not finite are left out; no reading gives null.
 * Source: Hyndman & Fan, The American Statistician 50 (1996) 361, definition 7.
 * @param p 0…1
 * @throws RangeError when p is outside 0…1
 */
export function quantile(values: Iterable<number>, p: number): number | null {
	return quantileOfSorted(sortedFinite(values), p);
}

/**
 * As {@link quantile}, of finite values that are already sorted.
 * @throws RangeError when p is outside 0…1
 */
export function quantileOfSorted(sorted: readonly number[], p: number): number | null {
	if (!(p >= 0 && p <= 1)) throw new RangeError(`quantile ${p} is outside 0 to 1`);
	const position = (sorted.length - 1) * p;
	const low = sorted[Math.floor(position)];
	const high = sorted[Math.ceil(position)];
	if (low === undefined || high === undefined) return null;
	return low + (high - low) * (position - Math.floor(position));
}
