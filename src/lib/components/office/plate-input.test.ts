import { describe, expect, it } from 'vitest';
import { namePlateSchema } from '$lib/model/unit';
import { plateFields, plateInput } from './plate-input';

describe('the fields of a name plate', () => {
	it('go there and back', () => {
		const plate = { serial: 'A-17', year: 2011, place: 'roof', charge: 212.5, oilGrade: 'POE 220', oilCharge: null };
		expect(plateInput(plateFields(plate))).toEqual(plate);
	});
	it('take a decimal comma, and leave empty what is not known', () => {
		expect(plateInput({ ...plateFields(undefined), charge: '80,5' })).toMatchObject({
			charge: 80.5,
			year: null,
			serial: ''
		});
	});
	it('refuse what is no number beside its field', () => {
		const refused = namePlateSchema.safeParse(plateInput({ ...plateFields(undefined), year: 'old' }));
		expect(refused.error?.issues[0]?.path).toEqual(['year']);
	});
});
