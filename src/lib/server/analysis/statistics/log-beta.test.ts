import { expect, it } from 'vitest';
import { logBeta } from './log-beta';

it('agrees with B(1/2, 1/2) = π and B(2, 3) = 1/12 (by hand)', () => {
	expect(Math.exp(logBeta(0.5, 0.5))).toBeCloseTo(Math.PI, 12);
	expect(Math.exp(logBeta(2, 3))).toBeCloseTo(1 / 12, 13);
});
