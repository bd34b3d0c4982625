import { describe, expect, it } from 'vitest';
import type { Start } from '$lib/model/wire/start';
import { findingOf, headingOf, splitLead, tripLineOf } from './sheet-words';

const site = { id: 'a', name: 'Invented', timeZone: 'Europe/Berlin', address: null, altitude: null };

/** An invented start; only what the words read. */
function start(changed: Partial<Start>): Start {
	return {
		startedAt: '2031-03-04T06:00:00Z',
		endedAt: '2031-03-04T06:01:35Z',
		outcome: 'tripped',
		outcomeReason: 'A protective alarm rose at the stop.',
		spacingSeconds: 5,
		trip: null,
		...changed
	} as Start;
}
const trip: NonNullable<Start['trip']> = {
	at: '2031-03-04T06:01:35Z',
	kind: 'oil-flow',
	basis: 'recorded',
	text: 'OIL FLOW',
	sureness: 1,
	reason: ''
};

describe('findingOf', () => {
	it('says how long it lasted and what stopped it', () => {
		expect(findingOf(start({ trip }))).toBe('tripped 1:35 in, oil flow');
		expect(findingOf(start({ outcome: 'held', endedAt: null }))).toMatch(/still runs/);
		expect(findingOf(start({ outcome: 'called-off' }))).toBe('called off after 95\u00a0s');
		expect(findingOf(start({ outcome: 'unclear' }))).toMatch(/cannot say why/);
	});
});

describe('headingOf', () => {
	it('stands on the site’s own clock', () => {
		expect(headingOf(start({ trip }), site)).toBe('Tue 4 Mar 2031 07:00:00: tripped 1:35 in, oil flow');
		expect(headingOf(start({ trip }), site, 'Tue 4 Mar 07:00: oil was late')).toBe('Tue 4 Mar 07:00: oil was late');
	});
});

describe('tripLineOf', () => {
	it('tells recorded from inferred, and the spacing', () => {
		const { lead, rest } = tripLineOf(start({ trip }), site);
		expect(lead).toBe('Tripped 07:01:35, 95\u00a0s in:');
		expect(rest).toBe(' oil flow, recorded, sampled every 5\u00a0s. The log says “OIL FLOW”.');
	});
});

describe('splitLead', () => {
	it('cuts after the first stop', () => {
		expect(splitLead('A: b. c')).toEqual({ lead: 'A:', rest: ' b. c' });
		expect(splitLead('A')).toEqual({ lead: 'A', rest: '' });
	});
});
