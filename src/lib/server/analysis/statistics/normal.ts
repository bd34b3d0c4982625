/**
 * Standard normal distribution function Φ(x).
 * Series of the error function for |x| < 3, continued fraction of its complement beyond; error under 1e-14.
 * Source: Abramowitz & Stegun, Handbook of Mathematical Functions (1964), 26.2.10 and 26.2.14.
 */
export function normalCdf(x: number): number {
	if (Number.isNaN(x)) throw new RangeError('normalCdf of NaN');
	const density = Math.exp(-0.5 * x * x) / Math.sqrt(2 * Math.PI);
	const size = Math.abs(x);
	if (size < 3) {
		let term = size;
		let sum = size;
		for (let k = 3; term > 1e-17 * sum; k += 2) sum += term *= (size * size) / k;
		return x < 0 ? 0.5 - density * sum : 0.5 + density * sum;
	}
	let fraction = 0;
	for (let k = 60; k >= 1; k--) fraction = k / (size + fraction);
	const tail = density / (size + fraction);
	return x < 0 ? tail : 1 - tail;
}

/**
 * Standard normal quantile Φ⁻¹(p), by bisection and Newton steps on {@link normalCdf}.
 * @param p strictly between 0 and 1
 * @throws RangeError otherwise
 */
export function normalQuantile(p: number): number {
	if (!(p > 0 && p < 1)) throw new RangeError(`normal quantile of ${p}: not between 0 and 1`);
	let low = -40;
	let high = 40;
	let x = 0;
	for (let i = 0; i < 200; i++) {
		const error = normalCdf(x) - p;
		if (error > 0) high = x;
		else low = x;
		const step = (error * Math.sqrt(2 * Math.PI)) / Math.exp(-0.5 * x * x);
		if (Math.abs(step) < 1e-13) return x - step;
		// A Newton step that leaves the bracket (far tails) gives way to bisection.
		x = x - step > low && x - step < high ? x - step : (low + high) / 2;
	}
	return x;
}
