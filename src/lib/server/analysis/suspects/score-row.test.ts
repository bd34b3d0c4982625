import { expect, it } from 'vitest';
import { MONDAY, startRecord } from '../../../../../fixtures/inference/start-record';
import { inventedInput } from '../testing/synthetic-log';
import { always, type ClueRule, natureIs, type SuspectRow } from './clue-rule';
import { contextOf } from './context';
import { scoreRow } from './score-row';

const reading = (strength: number) => () => ({ strength, sentence: 'x', figures: {}, starts: [] });
const row = (clues: ClueRule[], applies: SuspectRow['applies'] = always): SuspectRow => ({
	key: 'low-oil',
	family: 'oil',
	applies,
	clues,
	check: { key: 'x', title: 'x', tools: [], cautions: [], unitOff: true }
});
const starts = [startRecord(MONDAY)];
const score = (one: SuspectRow, compressor: 'screw' | 'scroll' | null = 'screw') =>
	scoreRow(one, contextOf({ input: inventedInput({}, { nature: { compressor } }), starts }, starts, [], []));

const speaks: ClueRule = {
	key: 'a',
	direction: 'for',
	weight: 0.6,
	discriminates: true,
	needs: [],
	read: reading(0.5)
};

it('adds what speaks for and takes off what speaks against (by hand)', () => {
	const scored = score(row([speaks, { ...speaks, key: 'b', direction: 'against', weight: 0.2, read: reading(1) }]));
	expect(scored?.score).toBeCloseTo(0.1, 12);
	expect(scored?.discriminator).toBeCloseTo(0.3, 12);
});

it('halves for a nature that is not known and leaves out what does not apply', () => {
	const screwOnly = row([speaks], natureIs('compressor', 'screw'));
	expect(score(screwOnly, null)?.score).toBeCloseTo(0.15, 12);
	expect(score(screwOnly, 'scroll')).toBeNull();
});

it('names what a clue lacks, and nothing when one of several would do', () => {
	const scored = score(row([{ ...speaks, needs: ['superheat', ['condWaterIn', 'outdoorTemp']] }]));
	expect(scored?.clues[0]).toMatchObject({ direction: 'missing', weight: 0.6 });
	expect(scored?.clues[0]?.sentence).toBe(
		'Cannot be read: the log has no suction temperature, evaporator saturation and condenser water entering.'
	);
	expect([...(scored?.missing.keys() ?? [])]).toEqual(['suctionTemp', 'evapSaturation', 'condWaterIn']);
});

it('lets a settled check overrule the log, and an indicative one only weigh', () => {
	const check = (strength: number): ClueRule => ({
		...speaks,
		key: 'check',
		direction: 'against',
		weight: 1,
		overrules: true,
		read: reading(strength)
	});
	expect(score(row([speaks, check(1)]))).toMatchObject({ overruled: true, discriminator: 0 });
	expect(score(row([speaks, check(0.5)]))).toMatchObject({ overruled: false });
});

it('is silent under the least strength', () => {
	expect(score(row([{ ...speaks, read: reading(0.05) }]))?.clues).toEqual([]);
});
