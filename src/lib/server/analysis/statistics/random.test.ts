import { expect, it } from 'vitest';
import { seededRandom, shuffled } from './random';

it('repeats itself for a seed and spreads evenly', () => {
	const a = seededRandom(5);
	const b = seededRandom(5);
	const counts = new Array<number>(10).fill(0);
	for (let i = 0; i < 10_000; i++) {
		const x = a();
		expect(b()).toBe(x);
		counts[Math.floor(x * 10)] = (counts[Math.floor(x * 10)] ?? 0) + 1;
	}
	// Chi-square with nine degrees of freedom: 27.9 is passed once in a thousand seeds.
	expect(counts.reduce((sum, n) => sum + (n - 1000) ** 2 / 1000, 0)).toBeLessThan(27.9);
});

it('shuffles without loss', () => {
	expect([...shuffled([1, 2, 3, 4, 5], seededRandom(2))].sort()).toEqual([1, 2, 3, 4, 5]);
});
