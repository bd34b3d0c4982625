export type ChangePoint = {
	/** Number of readings before the change. */
	index: number;
	statistic: number;
	twoSided: number;
};

/**
 * Pettitt's test for one change of level: K = max over t of |Σ_{i≤t<j} sign(xⱼ − xᵢ)|, chance about
 * 2·exp(−6K²/(n³ + n²)). Readings that are not finite are left out (the index then counts those kept); fewer than
 * six give null.
 * Source: Pettitt, Appl. Stat. 28 (1979) 126.
 */
export function pettitt(values: readonly number[]): ChangePoint | null {
	const kept = values.filter(Number.isFinite);
	const n = kept.length;
	if (n < 6) return null;
	let sum = 0;
	let best = { index: 0, statistic: 0 };
	kept.forEach((a, t) => {
		// Moving one reading from "after" to "before" changes the double sum by its signs against all readings.
		for (const b of kept) sum += Math.sign(b - a);
		if (t < n - 1 && Math.abs(sum) > best.statistic) best = { index: t + 1, statistic: Math.abs(sum) };
	});
	return { ...best, twoSided: Math.min(1, 2 * Math.exp((-6 * best.statistic ** 2) / (n ** 3 + n ** 2))) };
}
