import { mannWhitney } from './mann-whitney';

/**
 * The chance that a random x is larger than a random y, ties counted half: U/(n₁·n₂). An empty group gives null.
 * Source: Mann & Whitney (1947); called A by Vargha & Delaney, J. Educ. Behav. Stat. 25 (2000) 101.
 */
export function probabilityOfSuperiority(x: readonly number[], y: readonly number[]): number | null {
	const n1 = x.filter(Number.isFinite).length;
	const n2 = y.filter(Number.isFinite).length;
	const result = mannWhitney(x, y);
	return result === null ? null : result.u / (n1 * n2);
}
