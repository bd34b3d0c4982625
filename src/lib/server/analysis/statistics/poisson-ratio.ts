import { betaQuantile } from './beta-quantile';
import { logGamma } from './log-gamma';

export type PoissonRatioResult = { ratio: number; low: number; high: number; twoSided: number };

function binomialTwoSided(k: number, n: number, p: number): number {
	const chance = (x: number) =>
		Math.exp(logGamma(n + 1) - logGamma(x + 1) - logGamma(n - x + 1) + x * Math.log(p) + (n - x) * Math.log1p(-p));
	const seen = chance(k) * (1 + 1e-7);
	let sum = 0;
	for (let x = 0; x <= n; x++) if (chance(x) <= seen) sum += chance(x);
	return Math.min(1, sum);
}

/**
 * Ratio of two event rates, events₁/exposure₁ over events₂/exposure₂, exact given the sum of events (then events₁ is
 * binomial with p = r·t₁/(r·t₁ + t₂)); Clopper–Pearson interval. No event at all gives null; the ratio may be infinite.
 * Source: Przyborowski & Wilenski, Biometrika 31 (1940) 313; Clopper & Pearson, Biometrika 26 (1934) 404.
 * @throws RangeError when a count is no whole number ≥ 0 or an exposure not positive
 */
export function poissonRatio(
	events: readonly [number, number],
	exposure: readonly [number, number],
	level = 0.95
): PoissonRatioResult | null {
	const [k1, k2] = events;
	const [t1, t2] = exposure;
	for (const k of events) if (!Number.isInteger(k) || k < 0) throw new RangeError(`poissonRatio: ${k} is no count`);
	for (const t of exposure) if (!(t > 0)) throw new RangeError(`poissonRatio: exposure ${t} is not positive`);
	const n = k1 + k2;
	if (n === 0) return null;
	const toRatio = (p: number) => (p / (1 - p)) * (t2 / t1);
	const alpha = (1 - level) / 2;
	const low = k1 === 0 ? 0 : betaQuantile(alpha, k1, k2 + 1);
	const high = k2 === 0 ? 1 : betaQuantile(1 - alpha, k1 + 1, k2);
	return {
		ratio: k1 / t1 / (k2 / t2),
		low: toRatio(low),
		high: high === 1 ? Infinity : toRatio(high),
		twoSided: binomialTwoSided(k1, n, t1 / (t1 + t2))
	};
}
