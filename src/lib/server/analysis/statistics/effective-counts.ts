/**
 * Lag-1 correlation of a sequence, r₁ = Σ (xₜ − x̄)(xₜ₊₁ − x̄)/Σ (xₜ − x̄)²; null for fewer than three readings or
 * when nothing varies. Pairs with a missing day (NaN) are left out of the upper sum.
 * Source: Box & Jenkins, Time Series Analysis (1970) §2.1.
 */
export function lagOneCorrelation(sequence: readonly number[]): number | null {
	const kept = sequence.filter(Number.isFinite);
	if (kept.length < 3) return null;
	const mean = kept.reduce((sum, x) => sum + x, 0) / kept.length;
	const spread = kept.reduce((sum, x) => sum + (x - mean) ** 2, 0);
	if (spread === 0) return null;
	let together = 0;
	for (let i = 0; i + 1 < sequence.length; i++) {
		const pair = ((sequence[i] ?? NaN) - mean) * ((sequence[i + 1] ?? NaN) - mean);
		if (Number.isFinite(pair)) together += pair;
	}
	return together / spread;
}

/**
 * How many first tries count as one independent one: d = (1 + ρ)/(1 − ρ), where ρ is the lag-1 correlation of
 * first-try outcomes by day, shrunk by n/(n + 10) and clipped to 0…0.8 (shrinking and clipping are this product's own).
 * Source of the ratio: Bayley & Hammersley, J. R. Stat. Soc. Suppl. 8 (1946) 184, for a first-order chain.
 * @param byDay one outcome a day (0…1), NaN for a day without one
 */
export function dependence(byDay: readonly number[]): { rho: number; d: number } {
	const n = byDay.filter(Number.isFinite).length;
	const raw = lagOneCorrelation(byDay) ?? 0;
	const rho = Math.min(0.8, Math.max(0, (raw * n) / (n + 10)));
	return { rho, d: (1 + rho) / (1 - rho) };
}
