import { fromStored, MEASURES, pageMeasure, toStored, type Quantity, type UnitSystem } from '$lib/model/quantities';
import type { UnitNature } from '$lib/model/unit';

/** A question about the machine with named answers; none given means not known. */
export type ChoiceField = {
	key: keyof UnitNature;
	label: string;
	options: readonly { value: string; label: string }[];
};
/** A number about the machine, kept in stored units. */
export type NumberField = { key: keyof UnitNature; label: string; quantity: Quantity; hint?: string };

const choice = (key: keyof UnitNature, label: string, ...words: [string, string][]): ChoiceField => ({
	key,
	label,
	options: [{ value: '', label: 'not known' }, ...words.map(([value, text]) => ({ value, label: text }))]
});

export const CHOICE_FIELDS: readonly ChoiceField[] = [
	choice(
		'compressor',
		'Compressor',
		['screw', 'screw'],
		['scroll', 'scroll'],
		['reciprocating', 'reciprocating'],
		['centrifugal', 'centrifugal']
	),
	choice(
		'evaporator',
		'Evaporator',
		['flooded', 'flooded'],
		['falling-film', 'falling film'],
		['dx', 'direct expansion']
	),
	choice('condenser', 'Condenser', ['water', 'water-cooled'], ['air', 'air-cooled'], ['evaporative', 'evaporative']),
	choice(
		'metering',
		'Metering',
		['electronic-valve', 'electronic valve'],
		['thermostatic-valve', 'thermostatic valve'],
		['orifice', 'orifice'],
		['level', 'level control']
	),
	choice(
		'capacityControl',
		'Capacity control',
		['slide', 'slide'],
		['steps', 'steps'],
		['speed', 'speed'],
		['vanes', 'vanes']
	),
	choice(
		'slideActuation',
		'Slide moved by',
		['oil-both-ways', 'oil both ways'],
		['spring-unload', 'oil to load, spring to unload'],
		['gas', 'gas']
	),
	choice(
		'starter',
		'Starter',
		['wye-delta', 'wye-delta'],
		['solid-state', 'solid state'],
		['across-line', 'across the line'],
		['drive', 'variable-frequency drive']
	),
	choice(
		'oilCooling',
		'Oil cooling',
		['none', 'none'],
		['water', 'water'],
		['refrigerant', 'refrigerant'],
		['injection', 'injection']
	)
];

export const NUMBER_FIELDS: readonly NumberField[] = [
	{ key: 'ratedAmps', label: 'Rated current', quantity: 'current' },
	{ key: 'starterTransition', label: 'Starter transition after', quantity: 'duration' },
	{ key: 'startsPerHour', label: 'Starts an hour, at most', quantity: 'count', hint: 'From the manufacturer' },
	{ key: 'minCapacity', label: 'Least capacity', quantity: 'percent' },
	{ key: 'maxCapacity', label: 'Most capacity', quantity: 'percent' },
	{ key: 'designEvapFlow', label: 'Evaporator flow, design', quantity: 'flow' },
	{ key: 'designCondFlow', label: 'Condenser flow, design', quantity: 'flow' },
	{ key: 'designEvapDelta', label: 'Water difference, design', quantity: 'temperatureDifference' },
	{ key: 'designDuty', label: 'Duty, design', quantity: 'duty' }
];

/** The answers of the form, by field; an empty string is "not known". */
export type NatureAnswers = Record<string, string>;

/** The symbol a number is asked in. */
export function natureUnit(field: NumberField, system: UnitSystem): string {
	return MEASURES[pageMeasure(field.quantity, system)].symbol;
}

/** What the form begins with. */
export function natureAnswers(nature: UnitNature, system: UnitSystem): NatureAnswers {
	const answers: NatureAnswers = {};
	for (const { key } of CHOICE_FIELDS) answers[key] = String(nature[key] ?? '');
	for (const field of NUMBER_FIELDS) {
		const stored = nature[field.key];
		answers[field.key] =
			typeof stored === 'number'
				? String(Number(fromStored(stored, pageMeasure(field.quantity, system)).toFixed(2)))
				: '';
	}
	return answers;
}

/**
 * The answers as the API takes them, in stored units; an empty one is null, "not known".
 * @throws RangeError naming the field when a number cannot be read
 */
export function natureInput(answers: NatureAnswers, system: UnitSystem): Record<string, string | number | null> {
	const nature: Record<string, string | number | null> = {};
	for (const { key } of CHOICE_FIELDS) nature[key] = answers[key] || null;
	for (const field of NUMBER_FIELDS) {
		const text = (answers[field.key] ?? '').trim().replace(',', '.');
		if (text !== '' && !/^\d+(\.\d+)?$/.test(text)) throw new RangeError(`${field.label}: “${text}” is not a number`);
		nature[field.key] = text === '' ? null : toStored(Number(text), pageMeasure(field.quantity, system));
	}
	return nature;
}
