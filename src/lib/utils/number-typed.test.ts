import { expect, it } from 'vitest';
import { numberTyped } from './number-typed';

it('takes a comma and a true minus, and refuses words', () => {
	expect(numberTyped(' 7,5 ')).toBe(7.5);
	expect(numberTyped('−2')).toBe(-2);
	expect(numberTyped('')).toBeNull();
	expect(numberTyped('about 3')).toBeNaN();
});
