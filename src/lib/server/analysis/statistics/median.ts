import { quantile } from './quantile';

/** Median of the finite readings: the middle one, or the mean of the two middle ones; null when there is none. */
export function median(values: Iterable<number>): number | null {
	return quantile(values, 0.5);
}
