import { describe, expect, it } from 'vitest';
import type { StartSheet } from '$lib/model/wire/start-sheet';
import { tellingClues } from './telling-clues';

type StartClue = StartSheet['clues'][number];
/** An invented clue. */
const clue = (
	suspect: string,
	direction: StartClue['direction'],
	weight: number,
	sentence = `${suspect} ${weight}`
): StartClue => ({
	key: sentence,
	suspect,
	suspectName: suspect,
	direction,
	weight,
	sentence,
	figures: {},
	starts: []
});

describe('tellingClues', () => {
	it('gives the weightiest, for before against before missing', () => {
		const clues = [clue('a', 'missing', 1), clue('a', 'against', 1), clue('a', 'for', 0.2), clue('b', 'for', 0.9)];
		expect(tellingClues(clues).map(({ direction, suspect }) => `${direction} ${suspect}`)).toEqual([
			'for b',
			'for a',
			'against a',
			'missing a'
		]);
	});
	it('lets no suspect fill the list, and says nothing twice', () => {
		const clues = [1, 0.9, 0.8, 0.7].map((weight) => clue('a', 'for', weight));
		expect(tellingClues([...clues, clue('b', 'for', 0.1), clue('c', 'for', 0.05, 'a 1')])).toHaveLength(3);
	});
});
