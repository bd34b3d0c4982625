import { expect, it } from 'vitest';
import { MONDAY, startRecord } from '../../../../fixtures/inference/start-record';
import { previousShape } from './previous-shapes';

it('sets old beside new, in the person’s units (by hand: 2 K is 3.6 °F)', () => {
	const now = startRecord(MONDAY, { figures: { evapApproach: 3 } });
	const before = {
		methodVersion: '1',
		outcome: 'unclear' as const,
		tripKind: null,
		stall: null,
		figures: { evapApproach: 2, condApproach: null }
	};
	const shown = previousShape(before, now, 'ip');
	expect(shown.told).toEqual(['Outcome was unclear, is held.']);
	expect(shown.figures.find((figure) => figure.key === 'evapApproach')).toMatchObject({ before: 3.6, now: 5.4 });
	expect(shown.figures.find((figure) => figure.key === 'condApproach')?.before).toBeNull();
});
