import { describe, expect, it } from 'vitest';
import { MONDAY, startRecord, trippedRecord } from '../../../fixtures/inference/start-record';
import { previousOf } from './previous-method';

// Invented starts.
const now = { ...startRecord(MONDAY, { figures: { startCapacity: 45, evapApproach: 3 } }), methodVersion: '2' };
const old = { ...now, methodVersion: '1' };

describe('previousOf', () => {
	it('says nothing of the same version, or where both say the same', () => {
		expect(previousOf(now, now)).toBeNull();
		expect(previousOf(old, now)).toBeNull();
		const rounding = { ...old, figures: { ...old.figures, evapApproach: 3 + 1e-9 } };
		expect(previousOf(rounding, now)).toBeNull();
	});

	it('keeps the figures that differ as they were, one that was absent too', () => {
		const before = { ...old, figures: { ...old.figures, evapApproach: 2.5, startCapacity: null } };
		expect(previousOf(before, now)).toEqual({
			methodVersion: '1',
			outcome: 'held',
			tripKind: null,
			stall: null,
			figures: { evapApproach: 2.5, startCapacity: null }
		});
	});

	it('keeps another outcome and kind', () => {
		const before = { ...trippedRecord(MONDAY, { figures: now.figures }), methodVersion: '1' };
		expect(previousOf(before, now)).toMatchObject({ outcome: 'tripped', tripKind: 'low-evaporator-saturation' });
	});
});
