import { expect, it } from 'vitest';
import { midRanks } from './mid-ranks';

it('shares ranks between equals (by hand)', () => {
	expect(midRanks([30, 10, 20, 20])).toEqual([4, 1, 2.5, 2.5]);
});
