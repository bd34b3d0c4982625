import type { TripKind } from '$lib/model/start';
import { CAUTIONS, type CautionKey } from './suspects/cautions';

/**
 * What a person does before a trip is reset, by its kind, with the cautions that go with it.
 * `restartAllowed` is false for the kinds after which nothing may run until the reason is found (product.md, "Cautions").
 */
export type BeforeReset = { restartAllowed: boolean; advice: string[]; cautions: string[] };

type Entry = { restartAllowed: boolean; advice: readonly string[]; cautions: readonly CautionKey[] };

const low: Entry = {
	restartAllowed: true,
	advice: [
		'Read the panel as it stands: saturation, pressure, waters, oil, slide, valve. The state is gone after a reset.',
		'Prove evaporator flow: pump, valves, strainer, pressure drop.',
		'After a second trip in a row, check for water in the refrigerant before anything runs.'
	],
	cautions: ['freeze', 'resets', 'protections']
};
const stopped = (advice: readonly string[], cautions: readonly CautionKey[]): Entry => ({
	restartAllowed: false,
	advice,
	cautions
});
const calm = (advice: readonly string[], cautions: readonly CautionKey[] = ['resets', 'protections']): Entry => ({
	restartAllowed: true,
	advice,
	cautions
});
const electrical = stopped(
	['Leave it off. A qualified person finds the reason at the starter and the supply first.'],
	['electricalStop', 'electrical', 'remoteStart']
);

// Common practice of the trade, no source.
const TABLE: Readonly<Record<TripKind, Entry>> = {
	'low-evaporator-saturation': low,
	'low-suction-pressure': low,
	'low-leaving-water': low,
	'oil-flow': stopped(
		['Leave it off until the reason is found. Read the oil level as found, filter drop and valve positions.'],
		['oilStop', 'oilReading', 'hot', 'remoteStart']
	),
	'high-oil-temperature': calm(
		['Note oil and condensing temperatures, then look at oil cooling and level with the unit off.'],
		['resets', 'oilReading', 'hot']
	),
	'high-condensing': calm([
		'Note condenser water or air entering and leaving. Prove condenser flow or fans before a start.'
	]),
	'high-discharge-temperature': calm(
		['Note discharge and suction temperatures. Find the reason for the superheat before a start.'],
		['resets', 'protections', 'hot']
	),
	'loss-of-water-flow': calm(
		['Prove flow by the shell’s pressure drop, not by the switch alone.'],
		['freeze', 'protections', 'resets']
	),
	'low-pressure-difference': calm([
		'Note condenser water temperature and its valve or fans. Let the water warm before the next start.'
	]),
	'motor-temperature': stopped(
		['Leave it off until the winding has cooled and the reason is known.'],
		['electricalStop', 'electrical']
	),
	'starter-fault': electrical,
	'phase-or-supply': electrical,
	'sensor-or-communication': calm(['Compare the sensor with a reference beside it before it is believed again.']),
	'external-interlock': calm(
		['Find which interlock opened and why; the machine itself may be sound.'],
		['protections', 'remoteStart']
	),
	'refrigerant-detector': stopped(
		['Nobody enters before the detector reads clear and ventilation runs. Find the leak first.'],
		['refrigerant', 'remoteStart']
	),
	'emergency-stop': stopped(['Find out who pressed it and why before it is released.'], ['remoteStart', 'qualified']),
	other: calm(['Read the panel’s history word for word before a reset; it names the protection.']),
	unknown: calm(['Read the panel’s history word for word before a reset; this log does not say what stopped it.'])
};

/**
 * Advice before the reset of a trip.
 * @param startsLastHour starts of the circuit in the hour before the trip, this one included
 * @param allowedPerHour the maker's starts per hour, or null when nobody has given it
 */
export function beforeReset(kind: TripKind, startsLastHour: number, allowedPerHour: number | null): BeforeReset {
	const entry = TABLE[kind];
	const counted =
		allowedPerHour === null
			? `${startsLastHour} ${startsLastHour === 1 ? 'start' : 'starts'} in the last hour; the maker’s allowance is not given.`
			: `${startsLastHour} of ${allowedPerHour} starts allowed in an hour.`;
	const spent = allowedPerHour !== null && startsLastHour >= allowedPerHour;
	return {
		restartAllowed: entry.restartAllowed && !spent,
		advice: [...entry.advice, spent ? `${counted} Wait until the hour is over.` : counted],
		cautions: [CAUTIONS.qualified, ...entry.cautions.filter((key) => key !== 'qualified').map((key) => CAUTIONS[key])]
	};
}
