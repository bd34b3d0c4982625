import type { Quantity } from '$lib/model/quantities';
import type { Words } from '../wording/quantity-words';
import type { Difference } from './differences';

/**
 * The smallest shift of a quantity that tells anybody anything, in stored units: under it a difference may be certain
 * and still be nothing to act on [ours].
 */
const TELLING: Partial<Record<Quantity, number>> = {
	percent: 3,
	temperatureDifference: 0.6,
	pressureDifference: 20,
	current: 5,
	temperatureRate: 0.3,
	duration: 10
};
/** Quantities without a size of their own: a twentieth of the larger median. */
const SHARE = 0.05;

/** How many times its smallest telling size a difference is; 0 where it has no size. */
export function tellingSize(row: Difference): number {
	if (row.shift === null) return 0;
	const share = SHARE * Math.max(Math.abs(row.a ?? 0), Math.abs(row.b ?? 0));
	const least = TELLING[row.shiftQuantity] ?? share;
	return least > 0 ? Math.abs(row.shift) / least : 0;
}

/**
 * Differences worth saying, the most telling first: by how surely one group lies above the other, then by size. What is
 * certain but trifling stays in the table.
 */
export function tellingFirst(rows: readonly Difference[]): Difference[] {
	const apart = (row: Difference) => Math.abs((row.superiority ?? 0.5) - 0.5);
	// A half size more counts as much as a tenth more of certainty, up to ten sizes.
	const weight = (row: Difference) => apart(row) + 0.02 * Math.min(10, tellingSize(row));
	return rows.filter((row) => tellingSize(row) >= 1).sort((one, two) => weight(two) - weight(one));
}

/** "by 22 % to 31 %" as the interval has it; one figure where both ends read alike, nothing where it reaches zero. */
export function reachWords(row: Difference, words: Words): string {
	if (row.low === null || row.high === null || row.low * row.high <= 0) return '';
	const ends = [Math.abs(row.low), Math.abs(row.high)].sort((a, b) => a - b);
	const [least, most] = ends.map((end) => words.of(end, row.shiftQuantity));
	return least === most ? `, by about ${least}` : `, by ${least} to ${most}`;
}
