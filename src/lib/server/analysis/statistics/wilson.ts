import { normalQuantile } from './normal';

/**
 * Wilson's score interval of a proportion k of n, without continuity correction:
 * centre (p + z²/2n)/(1 + z²/n), half-width z·√(p(1−p)/n + z²/4n²)/(1 + z²/n).
 * Counts may be fractional (effective counts). n = 0 gives null.
 * Source: Wilson, J. Am. Stat. Assoc. 22 (1927) 209; Newcombe, Stat. Med. 17 (1998) 857.
 * @throws RangeError when k is not within 0…n or the level not between 0 and 1
 */
export function wilson(k: number, n: number, level = 0.95): { low: number; high: number } | null {
	if (!(k >= 0 && k <= n)) throw new RangeError(`wilson: ${k} of ${n} is no proportion`);
	if (!(level > 0 && level < 1)) throw new RangeError(`wilson: level ${level} is not between 0 and 1`);
	if (n === 0) return null;
	const z = normalQuantile(0.5 + level / 2);
	const p = k / n;
	const scale = 1 + (z * z) / n;
	const centre = (p + (z * z) / (2 * n)) / scale;
	const half = (z * Math.sqrt((p * (1 - p)) / n + (z * z) / (4 * n * n))) / scale;
	return { low: k === 0 ? 0 : Math.max(0, centre - half), high: k === n ? 1 : Math.min(1, centre + half) };
}
