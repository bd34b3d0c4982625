import { expect, it } from 'vitest';
import { GroupExpressionError, parseGroup } from './group-grammar';

it('reads every kind of term', () => {
	const terms = parseGroup(
		'first & rest>=6h & clock<11:00 & !attended & outcome:tripped,held & kind:oil-flow & before:c1 & ids:x,y & try=1 & from:2025-06-01'
	).terms;
	expect(terms).toEqual([
		{ not: false, kind: 'first' },
		{ not: false, kind: 'rest', compare: '>=', seconds: 21_600 },
		{ not: false, kind: 'clock', compare: '<', minutes: 660 },
		{ not: true, kind: 'attended' },
		{ not: false, kind: 'outcome', outcomes: ['tripped', 'held'] },
		{ not: false, kind: 'trip', kinds: ['oil-flow'] },
		{ not: false, kind: 'before', changeId: 'c1' },
		{ not: false, kind: 'ids', ids: ['x', 'y'] },
		{ not: false, kind: 'try', compare: '=', number: 1 },
		{ not: false, kind: 'from', date: '2025-06-01' }
	]);
});

it('takes start ids on their own', () => {
	const [a, b] = ['0d1e2f30-4151-4617-8a9b-acbdcedf0011', '0d1e2f30-4151-4617-8a9b-acbdcedf0022'];
	expect(parseGroup(`${a},${b}`).terms).toEqual([{ not: false, kind: 'ids', ids: [a, b] }]);
});

it('reads figures by short or full name, in °C or °F (by hand: 54 °F is 12.2 °C)', () => {
	expect(parseGroup('condWaterIn<54F').terms[0]).toMatchObject({ figure: 'condWaterInAtStart', compare: '<' });
	expect(parseGroup('condWaterIn<54F').terms[0]).toHaveProperty('value', expect.closeTo(12.222, 3));
	expect(parseGroup('headroom.evapSaturation<=-1.5').terms[0]).toMatchObject({
		figure: 'headroom.evapSaturation',
		value: -1.5
	});
});

it.each([
	['', /empty/],
	['first&&later', /empty/],
	['rest>6', /with s, m, h or d/],
	['clock<25:00', /HH:MM/],
	['outcome:exploded', /"exploded" is none of tripped/],
	['warmth>3', /no figure "warmth"/],
	['startCapacity>high', /"high" is no number/],
	['from:yesterday', /YYYY-MM-DD/],
	['ids:', /nothing follows/],
	['mornings', /is no condition/]
])('refuses "%s" and says why', (text, reason) => {
	expect(() => parseGroup(text)).toThrow(GroupExpressionError);
	expect(() => parseGroup(text)).toThrow(reason);
});
