import { describe, expect, it } from 'vitest';
import { READING_SCHEMAS } from '../model/wire/field';
import { completeCheck, judgeCheck, type AnyCheck, type CheckUnit } from './field-check';

// Invented readings. The 2 °F, 3 °F, 30 min and 5 min are common practice, no source.
const unit: CheckUnit = {
	limits: { oilLevelLow: 100, oilLevelHigh: 220, pairedSensorTolerance: null, hardSensorTolerance: null },
	nature: { evapFlowCurve: [{ drop: 50, flow: 40 }], designEvapFlow: 40 },
	air: 101.325
};

function check<K extends AnyCheck['kind']>(kind: K, readings: unknown): AnyCheck {
	return completeCheck({ kind, readings: READING_SCHEMAS[kind].parse(readings) } as AnyCheck, unit);
}

describe('oil level', () => {
	const settled = { heightMm: 160, minutesRun: 45, minutesOff: 8, equalised: true };

	it('is judged against the unit’s own band when read settled', () => {
		expect(judgeCheck(check('oil-level', settled), 'si')).toEqual({
			result: 'within',
			sentence: 'Oil level 160\u00a0mm above the separator’s base, within the unit’s band 100\u00a0mm to 220\u00a0mm.',
			reasons: []
		});
		expect(judgeCheck(check('oil-level', { ...settled, heightMm: 60 }), 'ip').sentence).toMatch(
			/2\.4\u00a0in .* under/
		);
	});

	it('is kept as found and indicative with every reason when conditions were not met', () => {
		const found = judgeCheck(
			check('oil-level', { heightMm: 60, minutesRun: 4, minutesOff: 1, equalised: false }),
			'si'
		);
		expect(found.result).toBe('outside');
		expect(found.reasons).toEqual([
			'it ran 4 min before, not about 30',
			'it was off 1 min, not 5',
			'the pressures were not equalised'
		]);
		expect(judgeCheck(check('oil-level', { heightMm: 60 }), 'si').reasons).toHaveLength(3);
	});

	it('cannot be told without a band', () => {
		const bare = { ...unit, limits: { ...unit.limits, oilLevelLow: null } };
		const read = completeCheck({ kind: 'oil-level', readings: READING_SCHEMAS['oil-level'].parse(settled) }, bare);
		expect(judgeCheck(read, 'si').result).toBe('cannot-tell');
	});
});

describe('sensor against a reference', () => {
	const off = (kelvin: number, more: object = {}) =>
		judgeCheck(check('sensor', { signal: 'evapWaterOut', displayed: 7 + kelvin, reference: 7, ...more }), 'ip');

	it('is out of tolerance beyond 2 °F (1.11 K), 3 °F when it is hard to reach', () => {
		expect(off(1.1).result).toBe('within');
		expect(off(1.2).result).toBe('outside');
		expect(off(1.2, { hardToReach: true }).result).toBe('within');
		expect(off(-1.7, { hardToReach: true }).result).toBe('outside');
		expect(off(1.2).sentence).toContain('+2.2\u00a0°F');
	});

	it('is indicative when not read at the same second, without flow, or with a poor instrument', () => {
		expect(off(0, { sameSecond: false }).reasons).toHaveLength(1);
		expect(off(0, { flowProved: false }).reasons).toEqual(['water flow was not proved']);
		expect(off(0, { accuracyK: 0.8 }).reasons).toHaveLength(1);
		expect(off(0, { sameSecond: true, flowProved: true, accuracyK: 0.2 }).reasons).toEqual([]);
	});
});

describe('other checks', () => {
	it('turn a pressure drop into flow and its share of design', () => {
		const flow = judgeCheck(check('water-flow', { side: 'evaporator', drop: 30 }), 'si');
		// By hand: 40·√(30/50) = 30.98 L/s, 77 % of 40.
		expect(flow.sentence).toContain('31.0\u00a0L/s');
		expect(flow).toMatchObject({ result: 'outside' });
		expect(judgeCheck(check('water-flow', { side: 'condenser', drop: 30 }), 'si').result).toBe('cannot-tell');
	});

	it('judge filter, valve and solenoid', () => {
		expect(judgeCheck(check('oil-filter-drop', { drop: 90, clean: 40 }), 'si').result).toBe('outside');
		expect(judgeCheck(check('valve-travel', { commanded: 80, actual: 61 }), 'si').result).toBe('outside');
		expect(judgeCheck(check('valve-travel', { commanded: 80, actual: 78 }), 'si').result).toBe('within');
		const coil = judgeCheck(check('solenoid', { which: 'unload', works: false, ohms: 12, ratedOhms: 12.5 }), 'si');
		expect(coil.sentence).toBe('Unload solenoid: what it commands does not move; 12.0\u00a0Ω against 12.5.');
	});
});
