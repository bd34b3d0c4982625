import fc from 'fast-check';
import { expect, it } from 'vitest';
import { mapDistinct } from './map-distinct';

it('gives what a plain map gives', () => {
	fc.assert(
		fc.property(fc.array(fc.oneof(fc.constantFrom(1, 1.5, -0.5, NaN), fc.double())), (list) => {
			const values = Float64Array.from(list);
			expect([...mapDistinct(values, (x) => 2 * x + 1)]).toEqual([...values.map((x) => 2 * x + 1)]);
		})
	);
});

it('works out each value once', () => {
	let calls = 0;
	mapDistinct(Float64Array.of(3, 3, 4, 3, 4, NaN, 3), (x) => (calls++, x));
	expect(calls).toBe(2);
});
