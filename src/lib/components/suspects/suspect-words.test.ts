import { describe, expect, it } from 'vitest';
import { SUSPECT_KEYS } from '$lib/model/suspect';
import type { Suspect, Suspects } from '$lib/model/wire/start';
import { suspectName, suspectsTitle, thoughtSteps } from './suspect-words';

/** An invented suspect. */
const suspect = (
	key: string,
	standing: Suspect['standing'],
	directions: ('for' | 'against' | 'missing')[] = []
): Suspect => ({
	key,
	name: key,
	rank: 1,
	standing,
	clues: directions.map((direction, k) => ({
		key: String(k),
		direction,
		weight: 1,
		sentence: '',
		figures: {},
		starts: []
	})),
	decisiveCheck: { key: '', title: '', tools: [], cautions: [], unitOff: false }
});
const answer = (changed: Partial<Suspects>): Suspects => ({
	verdict: 'fault-pattern',
	suspects: [],
	missingSignals: [],
	nextChecks: [],
	circuits: [],
	units: {},
	...changed
});

describe('suspectsTitle', () => {
	it('says what the log says, no more', () => {
		expect(suspectsTitle(answer({ suspects: [suspect('low-oil', 'points-to')] }), [])).toBe(
			'The log points to low oil'
		);
		expect(suspectsTitle(answer({ suspects: [suspect('low-oil', 'fits')] }), [])).toBe('The log fits low oil');
		expect(suspectsTitle(answer({ verdict: 'no-fault-pattern' }), [])).toBe('Nothing in this log points to a fault');
	});
	it('names what would decide when it cannot tell', () => {
		const title = suspectsTitle(answer({ verdict: 'cannot-tell', missingSignals: ['a', 'b', 'c', 'd'] }), [
			'a',
			'b',
			'c',
			'd'
		]);
		expect(title).toBe('This log cannot tell: a, b, c and 1 more would');
	});
});

describe('thoughtSteps', () => {
	it('goes from the reading to the feed, and is grey where the log cannot show', () => {
		const steps = thoughtSteps([
			suspect('low-oil', 'fits', ['for']),
			suspect('low-water-flow', 'cannot-tell', ['missing']),
			suspect('valve-underfeeding', 'cannot-tell', ['against'])
		]);
		expect(steps.map(({ name, standing }) => `${name} ${standing}`)).toEqual([
			'Is the reading real? cannot-tell',
			'Water cannot-tell',
			'Oil fits',
			'Load cannot-tell',
			'Feed speaks-against'
		]);
		expect(steps[2]?.leading).toBe('Low oil');
	});
	it('knows a step for every suspect', () => {
		for (const key of SUSPECT_KEYS) {
			const named = thoughtSteps([suspect(key, 'points-to')]).filter(({ leading }) => leading === suspectName(key));
			expect(`${key} ${named.length}`).toBe(`${key} 1`);
		}
	});
});
