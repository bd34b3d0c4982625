import { describe, expect, it } from 'vitest';
import { notedInputSchema } from '$lib/model/wire/noted';
import { countersBody, startBody, type TypedStart } from './record-form';

const site = { timeZone: 'America/Chicago', air: 101.325 };
// Invented.
const typed: TypedStart = {
	circuit: '1',
	startedAt: '2025-03-04T06:10',
	endedAt: '',
	outcome: 'tripped',
	tripKind: '',
	text: 'low oil flow',
	attended: false,
	note: '',
	readings: [
		{ signal: 'evapPressure', value: '38,5', moment: 'at-stop' },
		{ signal: 'oilTemp', value: '', moment: 'before' }
	]
};

describe('startBody', () => {
	it('takes the site’s clock, gauge pressures as absolute, and leaves blank readings out', () => {
		const body = startBody(typed, site, 'ip');
		// Chicago is six hours behind UTC in winter (tz database); 38.5 psi + 101.325 kPa of air, 6.894757 kPa a psi.
		expect(body).toMatchObject({ startedAt: '2025-03-04T12:10:00.000Z', endedAt: null, tripKind: null });
		const { readings } = body as { readings: { value: number }[] };
		expect(readings).toHaveLength(1);
		expect(readings[0]?.value).toBeCloseTo(38.5 * 6.894757 + 101.325, 3);
		expect(notedInputSchema.safeParse(body).success).toBe(true);
	});
	it('is refused when a reading is no number', () => {
		const wrong = { ...typed, readings: [{ signal: 'oilTemp', value: 'warm', moment: 'before' }] as const };
		expect(notedInputSchema.safeParse(startBody({ ...typed, readings: [...wrong.readings] }, site, 'si')).success).toBe(
			false
		);
	});
	it('forgets the trip kind of a start that did not trip', () => {
		expect(startBody({ ...typed, outcome: 'held', tripKind: 'oil-flow' }, site, 'si')).toMatchObject({
			tripKind: null
		});
	});
});

describe('countersBody', () => {
	it('is refused by the schema without an instant or a figure', () => {
		const empty = { circuit: '1', at: '', starts: '', runHours: '', note: '' };
		expect(notedInputSchema.safeParse(countersBody(empty, site)).success).toBe(false);
		const read = countersBody({ ...empty, at: '2025-03-04T06:10', starts: '4112' }, site);
		expect(notedInputSchema.safeParse(read).data).toMatchObject({ starts: 4112, runHours: null });
	});
});
