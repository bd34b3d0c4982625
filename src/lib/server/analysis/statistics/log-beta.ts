import { logGamma } from './log-gamma';

/**
 * ln B(a, b) = ln Γ(a) + ln Γ(b) − ln Γ(a + b).
 * @throws RangeError when a or b is not positive
 */
export function logBeta(a: number, b: number): number {
	return logGamma(a) + logGamma(b) - logGamma(a + b);
}
