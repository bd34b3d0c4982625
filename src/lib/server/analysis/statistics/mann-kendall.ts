import { normalCdf } from './normal';

export type MannKendallResult = { s: number; variance: number; z: number; twoSided: number };

/**
 * Mann–Kendall test for a monotonic trend: S = Σ sign(xⱼ − xᵢ), i < j, with the variance corrected for ties and
 * z = (S ∓ 1)/√variance. Readings that are not finite are left out; fewer than four give null.
 * Source: Mann, Econometrica 13 (1945) 245; Kendall, Rank Correlation Methods (1975).
 */
export function mannKendall(values: readonly number[]): MannKendallResult | null {
	const kept = values.filter(Number.isFinite);
	const n = kept.length;
	if (n < 4) return null;
	let s = 0;
	kept.forEach((a, i) => {
		for (let j = i + 1; j < n; j++) s += Math.sign((kept[j] ?? a) - a);
	});
	const counts = new Map<number, number>();
	for (const value of kept) counts.set(value, (counts.get(value) ?? 0) + 1);
	const term = (count: number) => count * (count - 1) * (2 * count + 5);
	let variance = term(n) / 18;
	for (const count of counts.values()) variance -= term(count) / 18;
	if (variance <= 0) return { s, variance: 0, z: 0, twoSided: 1 };
	const z = (s - Math.sign(s)) / Math.sqrt(variance);
	return { s, variance, z, twoSided: 2 * normalCdf(-Math.abs(z)) };
}
