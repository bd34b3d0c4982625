import { median } from './median';
import { normalQuantile } from './normal';

export type TheilSenResult = { slope: number; intercept: number; low: number; high: number };

/** Kendall's variance of S with ties in y: (n(n−1)(2n+5) − Σ t(t−1)(2t+5))/18. */
function kendallVariance(y: readonly number[]): number {
	const counts = new Map<number, number>();
	for (const value of y) counts.set(value, (counts.get(value) ?? 0) + 1);
	const term = (n: number) => n * (n - 1) * (2 * n + 5);
	let ties = 0;
	for (const count of counts.values()) ties += term(count);
	return (term(y.length) - ties) / 18;
}

/**
 * Theil–Sen line: the median of all pairwise slopes, intercept = median(y) − slope·median(x), and Sen's interval of the
 * slope by the normal form of Kendall's S. Pairs with a reading that is not finite are left out; fewer than two
 * different x give null.
 * Source: Sen, J. Am. Stat. Assoc. 63 (1968) 1379.
 * @throws RangeError when the lengths differ or the level is not between 0 and 1
 */
export function theilSen(x: readonly number[], y: readonly number[], level = 0.95): TheilSenResult | null {
	if (x.length !== y.length) throw new RangeError(`theilSen: ${x.length} x for ${y.length} y`);
	const points = x
		.map((a, i) => [a, y[i] ?? NaN] as const)
		.filter(([a, b]) => Number.isFinite(a) && Number.isFinite(b));
	const slopes: number[] = [];
	points.forEach(([xi, yi], i) => {
		for (const [xj, yj] of points.slice(i + 1)) if (xi !== xj) slopes.push((yj - yi) / (xj - xi));
	});
	slopes.sort((a, b) => a - b);
	const slope = median(slopes);
	const middleX = median(points.map(([a]) => a));
	const middleY = median(points.map(([, b]) => b));
	if (slope === null || middleX === null || middleY === null) return null;
	const reach = normalQuantile(0.5 + level / 2) * Math.sqrt(Math.max(0, kendallVariance(points.map(([, b]) => b))));
	const lower = Math.max(0, Math.round((slopes.length - reach) / 2) - 1);
	const upper = Math.min(slopes.length - 1, Math.round((slopes.length + reach) / 2));
	return {
		slope,
		intercept: middleY - slope * middleX,
		low: slopes[lower] ?? slope,
		high: slopes[upper] ?? slope
	};
}
