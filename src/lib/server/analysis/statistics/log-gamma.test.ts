import { expect, it } from 'vitest';
import { logGamma } from './log-gamma';

it('agrees with factorials and with Γ(1/2) = √π', () => {
	expect(logGamma(0.5)).toBeCloseTo(Math.log(Math.sqrt(Math.PI)), 13);
	expect(logGamma(11)).toBeCloseTo(Math.log(3628800), 12);
	expect(logGamma(0.1)).toBeCloseTo(2.252712651734206, 12);
	expect(() => logGamma(0)).toThrow(RangeError);
});
