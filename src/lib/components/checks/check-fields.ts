import { fromStored, MEASURES, pageMeasure, toStored, type Quantity, type UnitSystem } from '$lib/model/quantities';
import { isSignalKey, SIGNAL_KEYS, SIGNALS } from '$lib/model/signals';
import { SUSPECT_KEYS } from '$lib/model/suspect';
import type { CheckKind } from '$lib/model/wire/field';
import { SUSPECT_WORDS } from '$lib/model/words';
import { numberTyped } from '$lib/utils/number-typed';

/** The forms of the field checks, declared: what each asks, in which unit of measure. */

type Base = { key: string; label: string; hint?: string; optional?: boolean };
export type NumberField = Base & { type: 'number'; measure: FieldMeasure };
export type ChoiceField = Base & { type: 'choice'; options: readonly { value: string; label: string }[] };
export type YesNoField = Base & { type: 'yes-no'; yes?: string; no?: string };
export type TextField = Base & { type: 'text'; long?: boolean };
export type Field = NumberField | ChoiceField | YesNoField | TextField;
/** `signal` follows the chosen signal; the rest are quantities or plain units of a form. */
export type FieldMeasure = Quantity | 'signal' | 'height' | 'minutes' | 'ohms';

export const CHECK_WORDS: Readonly<Record<CheckKind, string>> = {
	'oil-level': 'Oil level',
	sensor: 'Sensor against a reference',
	'water-flow': 'Water flow',
	'oil-filter-drop': 'Oil filter drop',
	'valve-travel': 'Valve travel',
	solenoid: 'Solenoid',
	finding: 'Another finding',
	note: 'Note'
};

const MEASURED: readonly Quantity[] = ['temperature', 'pressure', 'pressureDifference', 'flow', 'percent', 'current'];
const signals = SIGNAL_KEYS.filter((key) => MEASURED.includes(SIGNALS[key].quantity)).map((value) => ({
	value,
	label: SIGNALS[value].label
}));
const suspects = SUSPECT_KEYS.map((value) => ({ value, label: SUSPECT_WORDS[value] }));
const number = (key: string, label: string, measure: FieldMeasure, more: Partial<Base> = {}): NumberField => ({
	type: 'number',
	key,
	label,
	measure,
	...more
});
const optional = { optional: true };

export const CHECK_FIELDS: Readonly<Record<CheckKind, readonly Field[]>> = {
	'oil-level': [
		number('heightMm', 'Height above the separator’s base', 'height'),
		number('minutesRun', 'Ran before', 'minutes', optional),
		number('minutesOff', 'Off before', 'minutes', optional),
		{ type: 'yes-no', key: 'equalised', label: 'Pressures equalised?', optional: true }
	],
	sensor: [
		{ type: 'choice', key: 'signal', label: 'Sensor', options: signals },
		number('displayed', 'Displayed', 'signal'),
		number('reference', 'Reference', 'signal'),
		{ type: 'text', key: 'instrument', label: 'Instrument', optional: true },
		number('accuracyK', 'Accuracy of the instrument', 'temperatureDifference', {
			optional: true,
			hint: 'plus or minus'
		}),
		{ type: 'yes-no', key: 'sameSecond', label: 'Same second?', optional: true },
		{ type: 'yes-no', key: 'flowProved', label: 'Flow proved?', no: 'Not yet', optional: true },
		{ type: 'yes-no', key: 'hardToReach', label: 'Hard to reach?' }
	],
	'water-flow': [
		{
			type: 'choice',
			key: 'side',
			label: 'Side',
			options: [
				{ value: 'evaporator', label: 'Evaporator' },
				{ value: 'condenser', label: 'Condenser' }
			]
		},
		number('drop', 'Pressure drop over the shell', 'pressureDifference', {
			optional: true,
			hint: 'same gauge on both connections'
		}),
		number('flow', 'Or the flow itself', 'flow', { optional: true, hint: 'when it was measured' })
	],
	'oil-filter-drop': [
		number('drop', 'Pressure drop', 'pressureDifference'),
		number('clean', 'With a clean filter', 'pressureDifference', { optional: true, hint: 'from the unit’s manual' })
	],
	'valve-travel': [number('commanded', 'Commanded', 'percent'), number('actual', 'Found at', 'percent')],
	solenoid: [
		{
			type: 'choice',
			key: 'which',
			label: 'Which',
			options: [
				{ value: 'load', label: 'Load' },
				{ value: 'unload', label: 'Unload' },
				{ value: 'liquid-line', label: 'Liquid line' },
				{ value: 'other', label: 'Other' }
			]
		},
		{ type: 'yes-no', key: 'works', label: 'Does what it commands move?' },
		number('ohms', 'Coil', 'ohms', { optional: true, hint: 'off, locked out' }),
		number('ratedOhms', 'Coil, rated', 'ohms', optional),
		number('volts', 'Under command', 'voltage', { optional: true, hint: 'qualified person only' }),
		number('ratedVolts', 'Rated', 'voltage', optional)
	],
	finding: [
		{ type: 'choice', key: 'suspect', label: 'Suspect', options: suspects },
		{ type: 'yes-no', key: 'confirms', label: 'What was found', yes: 'Confirms it', no: 'Rules it out' },
		{ type: 'text', key: 'text', label: 'What was read or seen', long: true }
	],
	note: [{ type: 'text', key: 'text', label: 'Note', long: true }]
};

/** The cautions that a form carries, besides that only qualified people work on this equipment. */
export const CHECK_CAUTIONS: Readonly<Record<CheckKind, readonly string[]>> = {
	'oil-level': [
		'Read as found. Do not run a machine suspected of low oil to settle a reading; it is kept as indicative then.',
		'Hot surfaces and pressurised oil: protective equipment. The maker’s oil grade only; do not overfill.'
	],
	sensor: ['The unit may start without warning: keep hands off pump and couplings. Hot surfaces.'],
	'water-flow': [
		'Prove flow before any start: lost flow can freeze and burst tubes and put water into the refrigerant.',
		'The pump may start without warning.'
	],
	'oil-filter-drop': [
		'Hot surfaces and pressurised oil: protective equipment.',
		'Never close both ends of a line full of liquid.'
	],
	'valve-travel': ['The unit may start without warning: off at the unit and at the plant system before hands go in.'],
	solenoid: [
		'Lock out and tag out, verify absence of voltage. Live measurements only by a qualified person, justified and permitted under the site’s rules.'
	],
	finding: ['Leave every protection as it is, and do not keep resetting a trip.'],
	note: []
};

/** How a field's number is shown and stored: symbol, and the conversion both ways. */
export function fieldMeasure(
	measure: FieldMeasure,
	system: UnitSystem,
	signal: string,
	air: number
): { symbol: string; toStored: (value: number) => number; fromStored: (value: number) => number } {
	const same = (symbol: string) => ({ symbol, toStored: (v: number) => v, fromStored: (v: number) => v });
	if (measure === 'minutes') return same('min');
	if (measure === 'ohms') return same('Ω');
	if (measure === 'height')
		return system === 'ip' ? { symbol: 'in', toStored: (v) => v * 25.4, fromStored: (v) => v / 25.4 } : same('mm');
	const quantity = measure === 'signal' ? (isSignalKey(signal) ? SIGNALS[signal].quantity : 'count') : measure;
	const key = pageMeasure(quantity, system);
	return {
		symbol: MEASURES[key].symbol.replace(' diff.', ''),
		toStored: (value) => toStored(value, key, air),
		fromStored: (value) => fromStored(value, key, air)
	};
}

/** What a form holds: every field as it was typed. */
export type Typed = Record<string, string>;

export type FormReadings = { readings: Record<string, unknown>; errors: Record<string, string> };

/** The readings a form holds, in stored units, and what is wrong beside which field. */
export function readingsOf(kind: CheckKind, typed: Typed, system: UnitSystem, air: number): FormReadings {
	const readings: Record<string, unknown> = {};
	const errors: Record<string, string> = {};
	for (const field of CHECK_FIELDS[kind]) {
		const text = typed[field.key] ?? '';
		if (text.trim() === '') {
			if (!field.optional && !(field.key === 'hardToReach')) errors[field.key] = 'Needed';
			continue;
		}
		if (field.type === 'number') {
			const value = numberTyped(text);
			if (value === null || Number.isNaN(value)) errors[field.key] = 'This is no number.';
			else readings[field.key] = fieldMeasure(field.measure, system, typed['signal'] ?? '', air).toStored(value);
		} else if (field.type === 'yes-no') readings[field.key] = text === 'yes';
		else readings[field.key] = text.trim();
	}
	return { readings, errors };
}
