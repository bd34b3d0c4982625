/**
 * Benjamini–Hochberg adjusted p-values, in the order given: min over j ≥ i of p₍ⱼ₎·m/j, at most 1.
 * A family is rejected at rate q where the adjusted value is q or less.
 * Source: Benjamini & Hochberg, J. R. Stat. Soc. B 57 (1995) 289.
 * @throws RangeError when a p is outside 0…1
 */
export function benjaminiHochberg(pValues: readonly number[]): number[] {
	for (const p of pValues) if (!(p >= 0 && p <= 1)) throw new RangeError(`benjaminiHochberg: ${p} is no chance`);
	const order = pValues.map((p, i) => ({ p, i })).sort((a, b) => b.p - a.p);
	const adjusted = new Array<number>(pValues.length).fill(1);
	let least = 1;
	order.forEach(({ p, i }, fromLargest) => {
		const rank = pValues.length - fromLargest;
		least = Math.min(least, (p * pValues.length) / rank);
		adjusted[i] = least;
	});
	return adjusted;
}
