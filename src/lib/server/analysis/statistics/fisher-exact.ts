import { logGamma } from './log-gamma';

const logChoose = (n: number, k: number) => logGamma(n + 1) - logGamma(k + 1) - logGamma(n - k + 1);

export type FisherResult = { twoSided: number; less: number; greater: number };

/**
 * Fisher's exact test of the table [[a, b], [c, d]] with both margins held: P(a) = C(a+b, a)·C(c+d, c)/C(n, a+c).
 * Two-sided: the sum over all tables no more probable than the one seen. `greater`: a as large or larger.
 * A table without any count, or with an empty row, gives 1 throughout.
 * Source: Fisher, The Design of Experiments (1935); Agresti, Categorical Data Analysis (1990) p. 61.
 * @throws RangeError when a count is negative or not whole
 */
export function fisherExact(a: number, b: number, c: number, d: number): FisherResult {
	for (const count of [a, b, c, d])
		if (!Number.isInteger(count) || count < 0) throw new RangeError(`fisherExact: ${count} is no count`);
	const first = a + b;
	const column = a + c;
	const all = first + c + d;
	const chance = (x: number) =>
		Math.exp(logChoose(first, x) + logChoose(all - first, column - x) - logChoose(all, column));
	const seen = chance(a);
	const result = { twoSided: 0, less: 0, greater: 0 };
	for (let x = Math.max(0, column - (all - first)); x <= Math.min(first, column); x++) {
		const p = chance(x);
		if (p <= seen * (1 + 1e-7)) result.twoSided += p;
		if (x <= a) result.less += p;
		if (x >= a) result.greater += p;
	}
	return {
		twoSided: Math.min(1, result.twoSided),
		less: Math.min(1, result.less),
		greater: Math.min(1, result.greater)
	};
}
