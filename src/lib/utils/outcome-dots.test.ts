import { describe, expect, it } from 'vitest';
import { outcomeDots } from './outcome-dots';

const size = { height: 60, column: 7, bar: 12, dot: 7 };
const x = (value: number) => value * 7;

describe('outcomeDots', () => {
	it('hangs trips from the top and stands held starts on the floor', () => {
		const [trip, held] = outcomeDots(
			[
				{ id: 'a', value: 3, tripped: true },
				{ id: 'b', value: 5, tripped: false }
			],
			x,
			size
		);
		expect(trip).toMatchObject({ x: 21, y: 9 });
		expect(held).toMatchObject({ x: 35, y: 53.5 });
	});
	it('stacks a column, closer when it is crowded, and leaves none out', () => {
		const many = Array.from({ length: 12 }, (_, k) => ({ id: String(k), value: 3, tripped: false }));
		const placed = outcomeDots(many, x, size);
		expect(placed).toHaveLength(12);
		expect(Math.min(...placed.map(({ y }) => y))).toBeGreaterThanOrEqual(27);
		expect(new Set(placed.map(({ y }) => y)).size).toBe(12);
	});
});
