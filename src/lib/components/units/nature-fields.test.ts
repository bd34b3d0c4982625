import { describe, expect, it } from 'vitest';
import { natureSchema } from '$lib/model/unit';
import { CHOICE_FIELDS, natureAnswers, natureInput, natureUnit, NUMBER_FIELDS } from './nature-fields';

describe('the machine’s form', () => {
	it('offers only answers that the model takes', () => {
		for (const field of CHOICE_FIELDS)
			for (const { value } of field.options)
				expect(natureSchema.safeParse({ [field.key]: value || null }).success, `${field.key} ${value}`).toBe(true);
	});
	it('sends what it was given, in stored units', () => {
		// 100 gpm is 6.309 L/s; 10 °F of difference is 5.556 K (worked by hand)
		const answers = { ...natureAnswers({}, 'ip'), compressor: 'screw', designEvapFlow: '100', designEvapDelta: '10' };
		const nature = natureInput(answers, 'ip');
		expect(nature.compressor).toBe('screw');
		expect(nature.starter).toBeNull();
		expect(nature.designEvapFlow).toBeCloseTo(6.309, 3);
		expect(nature.designEvapDelta).toBeCloseTo(5.556, 3);
		expect(natureSchema.safeParse(nature).success).toBe(true);
	});
	it('shows again what is stored', () => {
		const stored = natureSchema.parse(natureInput({ ...natureAnswers({}, 'ip'), designDuty: '300' }, 'ip'));
		expect(natureAnswers(stored, 'ip').designDuty).toBe('300');
	});
	it('names the field that is no number', () => {
		expect(() => natureInput({ ...natureAnswers({}, 'si'), ratedAmps: '250 A' }, 'si')).toThrow('Rated current');
		expect(NUMBER_FIELDS.map((field) => natureUnit(field, 'si'))).toContain('L/s');
	});
});
