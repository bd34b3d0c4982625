import { describe, expect, it } from 'vitest';
import type { Verdict } from '../outcomes/judge';
import { correctedVerdict, correctionOf } from './corrections';

const trip: Verdict = {
	outcome: 'tripped',
	trip: { at: 5, kind: 'unknown', basis: 'recorded', text: '17', sureness: 1, reason: '' },
	reason: ''
};

describe('corrections', () => {
	it('find the nearest start of their circuit within 2 min', () => {
		const list = [
			{ circuit: '1', startedAt: 1_000_000, reason: 'far' },
			{ circuit: '1', startedAt: 1_100_000, reason: 'near' },
			{ circuit: '2', startedAt: 1_110_000, reason: 'other circuit' }
		];
		expect(correctionOf(list, '1', 1_110_000)?.reason).toBe('near');
		expect(correctionOf(list, '1', 1_220_001)).toBeNull();
	});

	it('override kind or outcome and say why', () => {
		const kind = correctedVerdict(
			trip,
			{ circuit: '1', startedAt: 0, tripKind: 'oil-flow', reason: 'read the panel' },
			9
		);
		expect(kind.trip).toMatchObject({ at: 5, kind: 'oil-flow', basis: 'recorded' });
		expect(kind.reason).toContain('read the panel');
		const held = correctedVerdict(trip, { circuit: '1', startedAt: 0, outcome: 'called-off', reason: 'hand stop' }, 9);
		expect(held).toMatchObject({ outcome: 'called-off', trip: null });
		const made = correctedVerdict(held, { circuit: '1', startedAt: 0, outcome: 'tripped', reason: 'seen' }, 9);
		expect(made.trip).toMatchObject({ at: 9, kind: 'unknown', basis: 'inferred' });
		expect(correctedVerdict(trip, { circuit: '1', startedAt: 0, attended: true, reason: 'x' }, 9)).toBe(trip);
	});
});
