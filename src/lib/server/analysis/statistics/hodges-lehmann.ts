import { finite } from './finite';
import { EXACT_TOTAL, rankSumDistribution } from './mann-whitney';
import { median } from './median';
import { normalCdf, normalQuantile } from './normal';

export type ShiftResult = {
	/** Median of all differences x − y. */
	shift: number;
	/** Null when the groups are too small for any interval of the wished coverage. */
	interval: { low: number; high: number; coverage: number } | null;
};

/** The largest c with P(U < c) ≤ α/2 under no shift (no ties), and the coverage 1 − 2·P(U < c) it gives. */
function cutOff(n1: number, n2: number, alpha: number): { c: number; coverage: number } {
	if (n1 + n2 > EXACT_TOTAL) {
		const spread = Math.sqrt((n1 * n2 * (n1 + n2 + 1)) / 12);
		const c = Math.max(0, Math.floor((n1 * n2) / 2 + normalQuantile(alpha / 2) * spread));
		return { c, coverage: 1 - 2 * normalCdf((c - 0.5 - (n1 * n2) / 2) / spread) };
	}
	const ranks = Array.from({ length: n1 + n2 }, (_, i) => i + 1);
	const chances = rankSumDistribution(ranks, n1);
	const least = (n1 * (n1 + 1)) / 2;
	let below = 0;
	let c = 0;
	while (c < n1 * n2 && below + (chances[least + c] ?? 0) <= alpha / 2 + 1e-12) below += chances[least + c++] ?? 0;
	return { c, coverage: 1 - 2 * below };
}

/**
 * Hodges–Lehmann estimate of how much x lies above y: the median of the n₁·n₂ differences, with the interval between
 * the c-th smallest and the c-th largest difference. The coverage stated is the one achieved (at least the one wished);
 * ties make it larger still. Readings that are not finite are left out; an empty group gives null.
 * Source: Hodges & Lehmann, Ann. Math. Stat. 34 (1963) 598; Hollander & Wolfe (1973) ch. 4.
 * @throws RangeError when the level is not between 0 and 1
 */
export function hodgesLehmann(x: Iterable<number>, y: Iterable<number>, level = 0.95): ShiftResult | null {
	if (!(level > 0 && level < 1)) throw new RangeError(`hodgesLehmann: level ${level} is not between 0 and 1`);
	const first = finite(x);
	const second = finite(y);
	const differences = first.flatMap((a) => second.map((b) => a - b)).sort((a, b) => a - b);
	const shift = median(differences);
	if (shift === null) return null;
	const { c, coverage } = cutOff(first.length, second.length, 1 - level);
	const low = differences[c - 1];
	const high = differences[differences.length - c];
	const interval = c > 0 && low !== undefined && high !== undefined ? { low, high, coverage } : null;
	return { shift, interval };
}
