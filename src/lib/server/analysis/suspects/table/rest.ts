import { median } from '../../statistics/median';
import { countWords } from '../../wording/quantity-words';
import { cautionsFor } from '../cautions';
import { besideClue, figureClue, telling } from '../clue-builders';
import { always, type ClueRule, natureIs, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { oilOverAmbient } from '../rest-readings';
import { ramp } from '../strength';

const oilLiftSmall: ClueRule = figureClue({
	key: 'oil-lift-small',
	readAt: 'start',
	weight: 0.4,
	discriminates: true,
	what: 'Oil stood over evaporator saturation at the start by',
	quantity: 'temperatureDifference',
	figure: 'oilLiftAtStart',
	needs: ['oilTemp', 'evapSaturation'],
	of: (context) => context.bad.filter((start) => (start.restSeconds ?? 0) > 4 * 3600),
	strength: (value) => ramp(value, 10, 5),
	show: { signals: ['oilTemp', 'evapSaturation'], from: -3600, to: 120 }
});

export const refrigerantMigration: SuspectRow = {
	key: 'refrigerant-migration',
	family: 'oil',
	applies: always,
	clues: [
		oilLiftSmall,
		besideClue({
			key: 'wet-discharge',
			weight: 0.5,
			discriminates: true,
			// A sound centrifugal's discharge is hardly warmer than its saturation.
			applies: natureIs('compressor', 'screw', 'scroll', 'reciprocating'),
			what: 'Discharge superheat',
			quantity: 'temperatureDifference',
			trace: 'dischargeSuperheat',
			window: [25, 180],
			size: [7, 2.5],
			shift: [-4, -10]
		}),
		{
			key: 'only-after-long-rests',
			direction: 'for',
			weight: 0.2,
			needs: [],
			read: (context) => {
				const long = context.bad.filter((start) => start.tryNumber > 1 || (start.restSeconds ?? 0) > 5 * 3600);
				const shortHeld = context.held.filter((start) => (start.restSeconds ?? Infinity) < 4 * 3600);
				if (context.bad.length < 2 || shortHeld.length < 2) return SILENT;
				return {
					strength: ramp(long.length / context.bad.length, 0.8, 1),
					sentence: `${long.length} of ${countWords(context.bad.length, 'trip')} came after long rests, and ${countWords(shortHeld.length, 'start')} after short rests held.`,
					figures: { long: long.length, shortHeld: shortHeld.length },
					starts: long.slice(-5)
				};
			}
		},
		{
			key: 'short-rests-trip-too',
			direction: 'against',
			weight: 0.5,
			needs: [],
			read: (context) => {
				const short = context.bad.filter(
					(start) => start.tryNumber === 1 && (start.restSeconds ?? Infinity) < 3 * 3600
				);
				if (context.bad.length === 0) return SILENT;
				return {
					strength: ramp(short.length / context.bad.length, 0.1, 0.4),
					sentence: `${short.length} of ${countWords(context.bad.length, 'trip')} came after rests under 3 h.`,
					figures: { short: short.length },
					starts: short.slice(-5)
				};
			}
		},
		{
			...oilLiftSmall,
			key: 'oil-kept-warm',
			direction: 'against',
			weight: 0.6,
			discriminates: false,
			read: (context) => {
				const lift = context.figure('oilLiftAtStart', context.bad);
				if (!lift) return null;
				return {
					strength: ramp(lift.value, 9, 15),
					sentence: `Oil stood ${context.words.difference(lift.value)} over evaporator saturation at the start.`,
					figures: { oilLift: lift.value },
					starts: lift.starts.slice(-5)
				};
			}
		},
		besideClue({
			key: 'discharge-dry',
			direction: 'against',
			weight: 0.4,
			what: 'Discharge superheat is not low:',
			quantity: 'temperatureDifference',
			trace: 'dischargeSuperheat',
			window: [25, 180],
			size: [9, 16],
			shift: [4, 8]
		})
	],
	check: {
		key: 'oil-heater-current',
		title: 'Oil-heater current at rest, oil temperature overnight, tightness of the valves.',
		tools: ['clamp meter', 'surface thermometer'],
		cautions: cautionsFor('electrical', 'remoteStart', 'refrigerant', 'resets'),
		unitOff: true
	}
};

export const oilHeater: SuspectRow = {
	key: 'oil-heater',
	family: 'oil',
	applies: always,
	clues: [
		{
			key: 'oil-decays-to-ambient',
			readAt: 'rest',
			direction: 'for',
			weight: 0.7,
			discriminates: true,
			needs: ['oilTemp'],
			read: (context) => {
				const rest = oilOverAmbient(context);
				if (!rest) return null;
				return {
					// A heater that works keeps oil well over 10 K warm: common practice, no source. One rest may follow work on it.
					strength: ramp(rest.value, 7, 3.5) * ramp(rest.rests.length, 0, 3),
					sentence: `After rests of 6 h and more the oil stood only ${context.words.difference(rest.value)} over its surroundings, over ${countWords(rest.rests.length, 'rest')}.`,
					figures: { oilOverAmbient: rest.value },
					starts: rest.rests.slice(-5),
					show: { signals: ['oilTemp', 'evapSaturation', 'oilHeater'], from: -21_600, to: 0 }
				};
			}
		},
		{
			key: 'oil-plateau',
			readAt: 'rest',
			direction: 'against',
			weight: 0.7,
			needs: ['oilTemp'],
			read: (context) => {
				const rest = oilOverAmbient(context);
				if (!rest) return null;
				return {
					strength: ramp(rest.value, 7, 12),
					sentence: `The oil kept ${context.words.difference(rest.value)} over its surroundings through long rests.`,
					figures: { oilOverAmbient: rest.value },
					starts: rest.rests.slice(-5)
				};
			}
		}
	],
	explainedBy: [{ key: 'refrigerant-migration', share: 0.2 }],
	showsWithoutSymptom: true,
	check: {
		key: 'heater-amps',
		title: 'Heater current at rest, thermostat and supply.',
		tools: ['clamp meter', 'meter'],
		cautions: cautionsFor('electrical', 'remoteStart', 'hot'),
		unitOff: true
	}
};

/** Seconds until half of the pressure difference at the stop is gone. */
function equalisingHalfTimes(context: Context): { at: number; seconds: number }[] {
	const found: { at: number; seconds: number }[] = [];
	for (const start of context.starts) {
		const stop = start.endedAt;
		// Only normal stops of long runs: a trip leaves other pressures behind.
		if (stop === null || start.outcome !== 'held') continue;
		const first = context.reader.median('systemDelta', stop - 30_000, stop + 10_000);
		if (first === null || first < 100) continue;
		for (let after = 20; after <= 3600; after += 20) {
			const now = context.reader.last('systemDelta', stop + after * 1000, 60_000);
			if (now === null) break;
			if (now <= first / 2) {
				found.push({ at: stop, seconds: after });
				break;
			}
		}
	}
	return found;
}

export const valveLeakingBack: SuspectRow = {
	key: 'valve-leaking-back',
	family: 'feed',
	applies: always,
	clues: [
		{
			key: 'equalises-faster-than-before',
			readAt: 'rest',
			direction: 'for',
			weight: 0.4,
			discriminates: true,
			needs: ['systemDelta'],
			read: (context) => {
				const halves = equalisingHalfTimes(context);
				if (halves.length < 8) return halves.length === 0 ? null : SILENT;
				const third = Math.floor(halves.length / 3);
				const before = median(halves.slice(0, third).map((one) => one.seconds));
				const now = median(halves.slice(-third).map((one) => one.seconds));
				if (before === null || now === null) return SILENT;
				return {
					strength: ramp(now / before, 0.7, 0.4),
					sentence: `Pressures halve in ${context.words.seconds(now)} after a stop; earlier in the period in ${context.words.seconds(before)}.`,
					figures: { now, before },
					starts: telling(context).slice(-5)
				};
			}
		}
	],
	check: {
		key: 'equalising',
		title: 'Watch the pressures after a stop; isolate by the maker’s procedure.',
		tools: ['two gauges', 'watch'],
		cautions: cautionsFor('refrigerant', 'trappedLiquid', 'remoteStart'),
		unitOff: true
	}
};
