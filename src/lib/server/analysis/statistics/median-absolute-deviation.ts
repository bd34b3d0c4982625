import { finite } from './finite';
import { median } from './median';

/**
 * Median absolute deviation, median(|x − median(x)|), without the factor 1.4826 that fits it to a normal spread.
 * Readings that are not finite are left out; no reading gives null.
 * Source: Hampel, J. Am. Stat. Assoc. 69 (1974) 383.
 */
export function medianAbsoluteDeviation(values: Iterable<number>): number | null {
	const kept = finite(values);
	const centre = median(kept);
	return centre === null ? null : median(kept.map((value) => Math.abs(value - centre)));
}
