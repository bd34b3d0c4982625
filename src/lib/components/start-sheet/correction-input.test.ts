import { describe, expect, it } from 'vitest';
import { correctionInput } from './correction-input';

const held = { outcome: 'held', trip: null, attended: false } as const;

describe('correctionInput', () => {
	it('sends only what was set otherwise', () => {
		const set = { outcome: 'held', kind: 'unknown', attended: true, reason: 'we stood beside it' } as const;
		expect(correctionInput(held, set)).toEqual({ attended: true, reason: 'we stood beside it' });
	});
	it('gives the kind with a trip, and never without one', () => {
		const tripped = {
			outcome: 'tripped',
			kind: 'oil-flow',
			attended: false,
			reason: 'seen at the panel'
		} as const;
		expect(correctionInput(held, tripped)).toEqual({
			outcome: 'tripped',
			tripKind: 'oil-flow',
			reason: 'seen at the panel'
		});
		expect(correctionInput(held, { ...tripped, outcome: 'held' })).toEqual({ reason: 'seen at the panel' });
	});
});
