import { betaCdf } from './beta-cdf';

/**
 * Quantile of Beta(a, b), by bisection on {@link betaCdf}; error under 1e-12.
 * @throws RangeError when p is outside 0…1 or a or b is not positive
 */
export function betaQuantile(p: number, a: number, b: number): number {
	if (!(p >= 0 && p <= 1)) throw new RangeError(`Beta quantile of ${p}: outside 0 to 1`);
	if (!(a > 0 && b > 0)) throw new RangeError(`Beta(${a}, ${b}) is no distribution`);
	let low = 0;
	let high = 1;
	for (let i = 0; i < 60 && high - low > 1e-13; i++) {
		const middle = (low + high) / 2;
		if (betaCdf(middle, a, b) < p) low = middle;
		else high = middle;
	}
	return (low + high) / 2;
}
