import { expect, it } from 'vitest';
import { plateau, ramp } from './strength';

it('rises straight between its ends, either way round (by hand)', () => {
	expect(ramp(2, 0, 4)).toBe(0.5);
	expect(ramp(-3, 0, -2)).toBe(1);
	expect(ramp(1, 2, 4)).toBe(0);
	expect(() => ramp(1, 2, 2)).toThrow(RangeError);
});

it('stays full inside its band (by hand)', () => {
	expect(plateau(60, 52, 56, 68, 72)).toBe(1);
	expect(plateau(54, 52, 56, 68, 72)).toBe(0.5);
	expect(plateau(71, 52, 56, 68, 72)).toBe(0.25);
	expect(plateau(80, 52, 56, 68, 72)).toBe(0);
});
