import { expect, it } from 'vitest';
import { DAY, MONDAY, startRecord } from '../../../../../fixtures/inference/start-record';
import { inventedInput } from '../testing/synthetic-log';
import { besideStrength, driftClue, grew, growthClue, recent } from './clue-builders';
import { contextOf } from './context';

const context = (values: readonly (number | null)[], load = 90) => {
	const starts = values.map((condApproach, day) =>
		startRecord(MONDAY + day * DAY, { figures: { condApproach, settledCapacity: load } })
	);
	return contextOf({ input: inventedInput({}), starts }, starts, [], starts);
};
const beside = (value: number, shift: number | null, spread = 0, heldCount = 5) => ({
	value,
	shift,
	spread,
	heldCount,
	held: shift === null ? null : value - shift,
	values: [value],
	starts: []
});

it('lets the unit’s own history beat the size of a reading (by hand)', () => {
	expect(besideStrength(beside(12, null), [8, 12], [2, 6])).toBe(0.75);
	expect(besideStrength(beside(12, 0), [8, 12], [2, 6])).toBe(0.6);
	expect(besideStrength(beside(12, 4), [8, 12], [2, 6])).toBe(0.6);
	expect(besideStrength(beside(9, 6), [8, 12], [2, 6])).toBe(1);
	// A wide band of held starts asks for more: 3 MAD of 10 K.
	expect(besideStrength(beside(9, 6, 10), null, [2, 6])).toBe(0.5);
});

it('takes the later half of the starts that have the figure, four at least', () => {
	expect(recent(context([1, 2, null, 4, 5, null, 7, 8, 9, 10]), 'condApproach')).toHaveLength(4);
	expect(recent(context(Array.from({ length: 20 }, () => 1)))).toHaveLength(10);
});

it('finds growth between the first and the last third at like load', () => {
	const spec = {
		key: 'x',
		weight: 1,
		what: 'Approach',
		quantity: 'temperatureDifference',
		figure: 'condApproach',
		needs: [],
		factor: [1.3, 1.7],
		by: [0.4, 0.9]
	} as const;
	const grown = context([1.2, 1.2, 1.3, 1.6, 1.9, 2, 2.4, 2.5, 2.6]);
	expect(growthClue(spec).read(grown)?.strength).toBe(1);
	expect(grew(grown, 'condApproach')).toBe(true);
	expect(growthClue(spec).read(context([2, 2, 2.1, 2, 2, 2.1, 2, 2, 2.1]))?.strength).toBe(0);
	expect(growthClue(spec).read(context([1, 2, 3]))?.strength).toBe(0);
});

it('counts a drift only when its interval leaves zero out', () => {
	const spec = {
		key: 'x',
		weight: 1,
		what: 'Approach',
		quantity: 'temperatureDifference',
		figure: 'condApproach',
		needs: [],
		total: [1, 3]
	} as const;
	expect(driftClue(spec).read(context([1, 1.5, 2, 2.5, 3, 3.5, 4, 4.5, 5, 5.5]))?.strength).toBe(1);
	expect(driftClue(spec).read(context([1, 5, 1, 5, 1, 5, 1, 5, 1, 5]))?.strength).toBe(0);
});

it('scales to full load, and not from a load too light to scale (by hand: 1.5 K at half is 3 K)', () => {
	const half = context([1.5], 50);
	expect(half.atFullLoad('condApproach', half.starts)?.value).toBe(3);
	const light = context([1.5], 20);
	expect(light.atFullLoad('condApproach', light.starts)).toBeNull();
});
