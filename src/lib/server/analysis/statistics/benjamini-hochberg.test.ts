import { expect, it } from 'vitest';
import { WORKED_EXAMPLES } from '../../../../../fixtures/statistics/worked-examples';
import { benjaminiHochberg } from './benjamini-hochberg';

const [example] = WORKED_EXAMPLES.benjamini_hochberg;

it('agrees with the 15 comparisons of Benjamini & Hochberg 1995', () => {
	const adjusted = benjaminiHochberg(example.p);
	example.adjusted.forEach((expected, i) => expect(adjusted[i]).toBeCloseTo(expected, 7));
	expect(adjusted.filter((p) => p <= 0.05)).toHaveLength(example['rejected_at_0.05']);
});

it('keeps the order given and refuses what is no chance', () => {
	const turned = benjaminiHochberg([...example.p].reverse());
	expect(turned[14]).toBeCloseTo(0.0015, 12);
	expect(() => benjaminiHochberg([1.2])).toThrow(RangeError);
});
