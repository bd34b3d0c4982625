import { expect, it } from 'vitest';
import { MINUTE, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { firstTries } from './first-tries';
import { matchedComparison } from './matched';

const tries = (make: typeof startRecord, water: number[]) =>
	firstTries(water.map((condWaterInAtStart, i) => make(MONDAY + i * MINUTE, { figures: { condWaterInAtStart } })))
		.counted;

it('pairs alike starts once each (by hand: six pairs, all one way, are 2 of 64)', () => {
	const a = tries(trippedRecord, [20, 21, 22, 23, 24, 25, 35]);
	const b = tries(startRecord, [20.2, 21.1, 22.3, 23.2, 24.4, 25.1, 12]);
	expect(matchedComparison(a, b, new Set())).toEqual({
		pairs: 6,
		a: 6,
		b: 0,
		chance: 2 / 64,
		matchedOn: ['condenser water']
	});
});

it('does not match far ones, and not on what defines the groups', () => {
	expect(
		matchedComparison(
			tries(trippedRecord, [10, 11, 12, 13, 14, 15]),
			tries(startRecord, [24, 24, 24, 24, 24, 24]),
			new Set()
		)
	).toBeNull();
	expect(
		matchedComparison(tries(trippedRecord, [20]), tries(startRecord, [20]), new Set(['condWaterInAtStart']))
	).toBeNull();
});
