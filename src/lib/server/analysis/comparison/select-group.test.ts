import { expect, it } from 'vitest';
import { DAY, MINUTE, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { wordsFor } from '../wording/quantity-words';
import { parseGroup } from './group-grammar';
import { groupWords, selectGroup } from './select-group';

const context = {
	timeZone: 'UTC',
	changes: [{ id: 'c1', at: MONDAY + 2 * DAY, text: 'strainer cleaned', aimedAt: [], newHistory: false }]
};
const starts = [
	trippedRecord(MONDAY + 360 * MINUTE, { figures: { condWaterInAtStart: 11 } }),
	startRecord(MONDAY + 14 * 60 * MINUTE, { firstStart: false, restSeconds: 1800, figures: { condWaterInAtStart: 24 } }),
	startRecord(MONDAY + 5 * DAY + 360 * MINUTE, { restSeconds: null })
];
const pick = (text: string) => selectGroup(starts, parseGroup(text), context).map((start) => starts.indexOf(start));

it('picks by rest, clock, outcome, change and figure (by hand)', () => {
	expect(pick('all')).toEqual([0, 1, 2]);
	expect(pick('first&clock<11:00')).toEqual([0, 2]);
	expect(pick('later')).toEqual([1]);
	expect(pick('outcome:tripped')).toEqual([0]);
	expect(pick('kind:oil-flow')).toEqual([]);
	expect(pick('after:c1')).toEqual([2]);
	expect(pick('weekend')).toEqual([2]);
	expect(pick('to:2025-06-02')).toEqual([0, 1]);
});

it('takes a start without the reading neither way', () => {
	expect(pick('condWaterIn<12')).toEqual([0]);
	expect(pick('!condWaterIn<12')).toEqual([1]);
	expect(pick('!rest<1h')).toEqual([0]);
});

it('refuses ids and changes that are not there', () => {
	expect(() => pick('before:c9')).toThrow(/no such change/);
	expect(() => pick('ids:a')).toThrow(/no ids here/);
	expect(selectGroup(starts, parseGroup('ids:s1'), { ...context, idOf: (one) => `s${starts.indexOf(one)}` })).toEqual([
		starts[1]
	]);
});

it('says a group in words', () => {
	expect(groupWords(parseGroup('first&clock<11:00'), context, wordsFor('si'))).toBe('First starts, before 11:00');
	expect(groupWords(parseGroup('after:c1&condWaterIn<12'), context, wordsFor('ip'))).toBe(
		'After “strainer cleaned”, cond. water at start under 53.6 °F'
	);
});
