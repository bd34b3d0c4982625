import { logBeta } from '../statistics/log-beta';

/** α_j is spread over the changes of a case: 0.05/(j(j+1)) sums to 0.05. */
const ALPHA = 0.05;

/**
 * E value of "something changed" after a change: t trips and c clean among the exposed first starts since, against
 * k′ of m′ before. E = [B(½+t, 9½+c)/B(½, 9½)] ÷ [B(A+t, C+c)/B(A, C)], A = k′+½, C = m′−k′+½: a repaired machine that
 * trips about 1 in 20 against the old rate, each on average over what is left open about it. Counts may be fractional
 * (effective). Valid at every look (Ville's inequality); source of E values: Shafer, J. R. Stat. Soc. A 184 (2021) 407.
 * @throws RangeError when a count is negative or k′ exceeds m′
 */
export function eValue(before: { k: number; m: number }, after: { t: number; c: number }): number {
	const { k, m } = before;
	const { t, c } = after;
	if (!(k >= 0 && m >= k && t >= 0 && c >= 0))
		throw new RangeError(`eValue: ${k} of ${m} before, ${t} and ${c} after are no counts`);
	const [a, b] = [k + 0.5, m - k + 0.5];
	return Math.exp(logBeta(0.5 + t, 9.5 + c) - logBeta(0.5, 9.5) - (logBeta(a + t, b + c) - logBeta(a, b)));
}

/**
 * What E must reach after the j-th change of a case: 1/α_j = j(j+1)/0.05.
 * @throws RangeError when j is no whole number ≥ 1
 */
export function eThreshold(changeNumber: number): number {
	if (!Number.isInteger(changeNumber) || changeNumber < 1)
		throw new RangeError(`change number ${changeNumber} is not 1, 2, …`);
	return (changeNumber * (changeNumber + 1)) / ALPHA;
}

/**
 * How many more clean exposed starts are needed to reach the threshold with at least five clean; null when even
 * `most` would not do.
 */
export function cleanStillNeeded(
	before: { k: number; m: number },
	after: { t: number; c: number },
	threshold: number,
	most = 1000
): number | null {
	for (let more = Math.max(0, 5 - after.c); more <= most; more++)
		if (eValue(before, { t: after.t, c: after.c + more }) >= threshold) return more;
	return null;
}
