import { countWords } from '../../wording/quantity-words';
import { besideClue, figureClue } from '../clue-builders';
import { type ClueRule, natureIs, SILENT } from '../clue-rule';
import type { Context } from '../context';
import { ramp } from '../strength';

export const flooded = (context: Context) =>
	context.nature.evaporator === 'flooded' || context.nature.evaporator === 'falling-film';
export const dx = natureIs('evaporator', 'dx');
export const valved = natureIs('metering', 'electronic-valve', 'thermostatic-valve', 'level');

/** Superheat of the trip minute: beside held starts, or against its usual upper end. */
export const superheatHigh = (weight: number): ClueRule =>
	besideClue({
		key: 'superheat-high',
		weight,
		discriminates: true,
		what: 'Superheat',
		quantity: 'temperatureDifference',
		trace: 'superheat',
		window: 'trip minute',
		size: (context) => {
			const high = context.limit('superheatUsualHigh') ?? (flooded(context) ? 6 : 9);
			return [high + 1, high + 6];
		},
		shift: [2, 6]
	});
export const dischargeSuperheatHigh = (weight: number): ClueRule =>
	besideClue({
		key: 'discharge-superheat-high',
		weight,
		discriminates: true,
		what: 'Discharge superheat',
		quantity: 'temperatureDifference',
		trace: 'dischargeSuperheat',
		window: 'trip minute',
		size: [28, 40],
		shift: [3, 10]
	});
export const superheatLow = (weight: number): ClueRule =>
	besideClue({
		key: 'superheat-low-at-trip',
		direction: 'against',
		weight,
		what: 'Superheat is low:',
		quantity: 'temperatureDifference',
		trace: 'superheat',
		window: 'trip minute',
		size: (context) => (flooded(context) ? [0.8, -0.5] : [3.5, 1]),
		shift: [-4, -8]
	});

/** Subcooling says on which side of the valve the liquid is missing. */
export const subcooling = (
	key: string,
	direction: 'for' | 'against',
	weight: number,
	ends: readonly [number, number],
	discriminates = false
): ClueRule => ({
	key,
	direction,
	weight,
	discriminates,
	needs: ['subcooling'],
	read: (context) => {
		const settled = context.figure('settledSubcooling', context.starts);
		const reading = settled ?? context.tripMinute('subcooling');
		if (!reading) return null;
		return {
			strength: ramp(reading.value, ...ends),
			sentence: `Subcooling ${context.words.difference(reading.value)} ${settled ? 'in settled runs' : 'in the trip minute'}, median of ${countWords(reading.starts.length, 'start')}.`,
			figures: { subcooling: reading.value },
			starts: reading.starts.slice(-8),
			show: { signals: ['subcooling', 'liquidTemp'], from: 0, to: 1800 }
		};
	}
});

/** Valve wide in settled runs: the plant runs short of liquid all the time, not only at the start. */
export const valveWideSettled = (weight: number): ClueRule =>
	figureClue({
		key: 'valve-wide-in-runs',
		weight,
		applies: valved,
		what: 'Mean valve position of held runs',
		quantity: 'percent',
		figure: 'meanValvePosition',
		needs: ['valvePosition'],
		of: (context) => context.held,
		strength: (value) => ramp(value, 75, 92)
	});
export const superheatInRuns = (weight: number, discriminates = false): ClueRule =>
	figureClue({
		key: 'superheat-high-in-runs',
		weight,
		discriminates,
		what: 'Settled superheat',
		quantity: 'temperatureDifference',
		figure: 'superheat',
		needs: ['superheat'],
		of: (context) => context.held,
		strength: (value, context) => {
			const high = context.limit('superheatUsualHigh') ?? (flooded(context) ? 6 : 9);
			return ramp(value, high, high + 4);
		}
	});
export const startsAnyTime: ClueRule = {
	key: 'short-rests-trip-too',
	direction: 'for',
	weight: 0.1,
	needs: [],
	read: (context) => {
		const short = context.bad.filter((start) => !start.firstStart && start.tryNumber === 1);
		if (context.bad.length < 2) return SILENT;
		return {
			strength: ramp(short.length / context.bad.length, 0.05, 0.3),
			sentence: `${short.length} of ${countWords(context.bad.length, 'trip')} came after short rests: it is not only the first start.`,
			figures: { short: short.length, trips: context.bad.length },
			starts: short.slice(-5)
		};
	}
};
