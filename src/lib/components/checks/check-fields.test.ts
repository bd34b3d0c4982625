import { describe, expect, it } from 'vitest';
import { CHECK_KINDS, READING_SCHEMAS } from '$lib/model/wire/field';
import { CHECK_FIELDS, fieldMeasure, readingsOf } from './check-fields';

const AIR = 101.325;

describe('readingsOf', () => {
	it('turns what was typed into stored units that the API’s own schema takes', () => {
		// 212 °F is 100 °C, 32 °F is 0 °C; a difference of 1.8 °F is 1 K (by definition).
		const { readings, errors } = readingsOf(
			'sensor',
			{ signal: 'evapWaterOut', displayed: '212', reference: '32', accuracyK: '1.8', sameSecond: 'yes' },
			'ip',
			AIR
		);
		expect(errors).toEqual({});
		expect(readings).toMatchObject({ signal: 'evapWaterOut', sameSecond: true });
		expect(readings['displayed']).toBeCloseTo(100, 9);
		expect(readings['reference']).toBeCloseTo(0, 9);
		expect(readings['accuracyK']).toBeCloseTo(1, 9);
		expect(READING_SCHEMAS.sensor.safeParse(readings).success).toBe(true);
	});

	it('says beside which field something is missing or no number', () => {
		expect(readingsOf('oil-level', { minutesRun: 'ten' }, 'si', AIR).errors).toEqual({
			heightMm: 'Needed',
			minutesRun: 'This is no number.'
		});
	});

	it('reads a gauge pressure against the site’s own air', () => {
		const { readings } = readingsOf('sensor', { signal: 'evapPressure', displayed: '200', reference: '201' }, 'si', 95);
		expect(readings['displayed']).toBe(295);
	});
});

describe('the forms', () => {
	it('ask only what the API’s schemas know', () => {
		for (const kind of CHECK_KINDS) {
			const known = Object.keys(READING_SCHEMAS[kind].shape);
			for (const field of CHECK_FIELDS[kind]) expect(known, `${kind}.${field.key}`).toContain(field.key);
		}
	});

	it('measure heights in inches or millimetres', () => {
		expect(fieldMeasure('height', 'ip', '', AIR).toStored(4)).toBeCloseTo(101.6, 9);
		expect(fieldMeasure('height', 'si', '', AIR).symbol).toBe('mm');
	});
});
