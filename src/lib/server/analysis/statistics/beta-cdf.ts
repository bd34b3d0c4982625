import { logBeta } from './log-beta';

/** Lentz's evaluation of the continued fraction of the incomplete beta function (Abramowitz & Stegun 26.5.8). */
function fraction(x: number, a: number, b: number): number {
	const tiny = 1e-300;
	let c = 1;
	let d = 1 - ((a + b) * x) / (a + 1);
	d = 1 / (Math.abs(d) < tiny ? tiny : d);
	let result = d;
	for (let m = 1; m <= 500; m++) {
		const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
		const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
		for (const step of [even, odd]) {
			d = 1 + step * d;
			c = 1 + step / c;
			d = 1 / (Math.abs(d) < tiny ? tiny : d);
			c = Math.abs(c) < tiny ? tiny : c;
			result *= c * d;
		}
		if (Math.abs(c * d - 1) < 1e-15) break;
	}
	return result;
}

/**
 * Distribution function of Beta(a, b) at x: the regularised incomplete beta function I_x(a, b).
 * Source: Abramowitz & Stegun (1964) 26.5.1, 26.5.8.
 * @throws RangeError when a or b is not positive or x is outside 0…1
 */
export function betaCdf(x: number, a: number, b: number): number {
	if (!(a > 0 && b > 0)) throw new RangeError(`Beta(${a}, ${b}) is no distribution`);
	if (!(x >= 0 && x <= 1)) throw new RangeError(`betaCdf: ${x} is outside 0 to 1`);
	if (x === 0 || x === 1) return x;
	const front = Math.exp(a * Math.log(x) + b * Math.log1p(-x) - logBeta(a, b));
	return x < (a + 1) / (a + b + 2) ? (front * fraction(x, a, b)) / a : 1 - (front * fraction(1 - x, b, a)) / b;
}
