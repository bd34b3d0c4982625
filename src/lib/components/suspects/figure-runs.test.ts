import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { figureRuns } from './figure-runs';

describe('figureRuns', () => {
	it('takes a number with its unit of measure, and leaves the words', () => {
		expect(figureRuns('lift 7.2 K at 60 s, in 3 of 4.')).toEqual([
			{ text: 'lift ', figure: false },
			{ text: '7.2 K', figure: true },
			{ text: ' at ', figure: false },
			{ text: '60 s', figure: true },
			{ text: ', in ', figure: false },
			{ text: '3', figure: true },
			{ text: ' of ', figure: false },
			{ text: '4', figure: true },
			{ text: '.', figure: false }
		]);
	});
	it('does not take a word that begins like a unit', () => {
		expect(figureRuns('5 starts')[0]).toEqual({ text: '5', figure: true });
	});
	it('loses nothing', () => {
		fc.assert(
			fc.property(
				fc.string(),
				(text) =>
					figureRuns(text)
						.map((run) => run.text)
						.join('') === text
			)
		);
	});
});
