/**
 * Quantile of weighted values: the least value whose cumulated weight reaches p of the whole.
 * @param items value and weight; weights of zero or less, and values that are not finite, are left out
 * @returns null when no weight remains
 * @throws RangeError when p is outside 0…1
 */
export function weightedQuantile(items: readonly { value: number; weight: number }[], p: number): number | null {
	if (!(p >= 0 && p <= 1)) throw new RangeError(`quantile ${p} is outside 0 to 1`);
	const kept = items.filter((item) => item.weight > 0 && Number.isFinite(item.value));
	kept.sort((a, b) => a.value - b.value);
	const whole = kept.reduce((sum, item) => sum + item.weight, 0);
	let passed = 0;
	for (const item of kept) {
		passed += item.weight;
		if (passed >= p * whole) return item.value;
	}
	return null;
}
