import { describe, expect, it } from 'vitest';
import { episodesOf } from './episodes';

describe('episodesOf', () => {
	// Worked by hand from the definition: an episode lasts until a start outlives the window or the rest reaches 6 h.
	it('counts tries until one outlives the window or the rest is long', () => {
		const starts = [
			{ startedAt: 1, restSeconds: null, outlived: false },
			{ startedAt: 2, restSeconds: 600, outlived: false },
			{ startedAt: 3, restSeconds: 600, outlived: true },
			{ startedAt: 4, restSeconds: 600, outlived: false },
			{ startedAt: 5, restSeconds: 21_600, outlived: false },
			{ startedAt: 6, restSeconds: null, outlived: false }
		];
		expect(episodesOf(starts, 21_600).map((e) => [e.episode, e.tryNumber])).toEqual([
			[1, 1],
			[1, 2],
			[1, 3],
			[4, 1],
			[5, 1],
			[6, 1]
		]);
	});
});
