const LANCZOS = [
	0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
	12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7
] as const;

/**
 * ln Γ(x) for x > 0, by Lanczos' series with g = 7 and nine terms; relative error about 1e-15.
 * Source: Lanczos, SIAM J. Numer. Anal. B 1 (1964) 86; coefficients by Godfrey (2001), recalled.
 * @throws RangeError when x is not positive
 */
export function logGamma(x: number): number {
	if (!(x > 0)) throw new RangeError(`logGamma of ${x}: not positive`);
	if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - logGamma(1 - x);
	const shifted = x - 1;
	let sum: number = LANCZOS[0];
	LANCZOS.slice(1).forEach((coefficient, i) => (sum += coefficient / (shifted + i + 1)));
	const base = shifted + 7.5;
	return 0.5 * Math.log(2 * Math.PI) + (shifted + 0.5) * Math.log(base) - base + Math.log(sum);
}
