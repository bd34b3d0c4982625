import type { FieldCheckFact } from '$lib/model/checks';
import type { StartRecord } from '$lib/model/start';
import { cautionsFor } from '../cautions';
import { besideClue, checkClue, driftClue, figureClue, growthOf, recent, telling } from '../clue-builders';
import { always, type ClueRule, natureIs, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { plateau, ramp } from '../strength';
import { countWords } from '../../wording/quantity-words';
import { capacityRuns, latestCheck, oilPressureLost, oilShareLost, stallShare, tripsOfKind } from './shared';

const oilMoved = natureIs('slideActuation', 'oil-both-ways');
const screw = natureIs('compressor', 'screw');
/** Fixed heights belong to the unit's manual: a level without its band says nothing. */
const oilLevel = (check: FieldCheckFact) => (check.kind === 'oil-level' && check.lowMm !== null ? check : null);

/** Stall near 85–90 % of capacity: common practice of the trade, no published source. */
const stallNearFull: ClueRule = {
	key: 'stall-near-full',
	direction: 'for',
	weight: 0.5,
	discriminates: true,
	needs: ['capacity'],
	read: (context) => {
		const share = stallShare(context);
		if (!share) return SILENT;
		const low = context.limit('stallBandLow') ?? 83;
		const high = context.limit('stallBandHigh') ?? 93;
		return {
			...share.reading,
			strength: share.sureness * ramp(share.share, 0.1, 0.4) * plateau(share.level, low - 4, low, high + 1, high + 5)
		};
	}
};

/** How far the unit's own oil figures have moved the way low oil moves them, 0…1: margin, oil temperature, start capacity. */
function oilHasChanged(context: Context): number {
	const grown = (figure: 'settledMargin' | 'settledOilTemp' | 'startCapacity', ends: readonly [number, number]) => {
		const growth = growthOf(context, figure);
		return growth ? ramp(growth.now.value - growth.before.value, ...ends) : 0;
	};
	// Over baseline at like lift and load by max(3 K, 3 MAD), capacity at start by 8 points (method.md) [ours].
	return Math.max(grown('settledMargin', [1.8, 3]), grown('settledOilTemp', [2, 3.5]), grown('startCapacity', [3, 7]));
}

/** Which share of the first third of the long runs stalled. */
function stalledEarly(context: Context): number {
	const runs = capacityRuns(context);
	const early = runs.slice(0, Math.ceil(runs.length / 3));
	return early.length === 0 ? 0 : early.filter((start) => start.stall?.verdict === 'stall').length / early.length;
}

/** Loading stalls since the oil's margin or the capacity at start rose: a dead solenoid moves neither. */
const stallsAsOilChanges: ClueRule = {
	key: 'stalls-since-oil-changed',
	direction: 'for',
	weight: 0.45,
	discriminates: true,
	applies: oilMoved,
	readAt: 'run',
	needs: ['capacity', ['margin', 'oilTemp']],
	read: (context) => {
		const share = stallShare(context);
		if (!share) return SILENT;
		return {
			...share.reading,
			// Low oil stalls near 85–90 %, seldom under 75 %; what stalled before the oil changed has another cause.
			strength:
				share.sureness *
				ramp(share.share, 0.05, 0.2) *
				ramp(share.level, 70, 78) *
				ramp(stalledEarly(context), 0.7, 0.3) *
				oilHasChanged(context),
			sentence: `${share.reading.sentence} The oil's margin, its temperature or the capacity at start has risen meanwhile.`
		};
	}
};

/** How much more loaded the machine starts after long rests than after short ones, points; null without two of each. */
export function restsLoadIt(context: Context): { more: number; long: number; short: number } | null {
	const capacity = (starts: readonly StartRecord[]) => context.figure('startCapacity', starts);
	const rest = (start: StartRecord) => start.restSeconds ?? NaN;
	const long = capacity(context.starts.filter((start) => rest(start) >= 6 * 3600));
	const short = capacity(context.starts.filter((start) => rest(start) < 3 * 3600));
	if (!long || !short || long.values.length < 2 || short.values.length < 2) return null;
	return { more: long.value - short.value, long: long.value, short: short.value };
}

/** Oil drains from the cylinder over a long rest when there is little of it: common practice, no source. */
const moreLoadedAfterRests: ClueRule = {
	key: 'more-loaded-after-long-rests',
	direction: 'for',
	weight: 0.25,
	readAt: 'start',
	applies: oilMoved,
	needs: ['capacity'],
	read: (context) => {
		const rests = restsLoadIt(context);
		if (!rests) return SILENT;
		return {
			strength: ramp(rests.more, 2.5, 6),
			sentence: `Capacity at start ${context.words.percent(rests.long)} after rests of 6 h and more, ${context.words.percent(rests.short)} after short ones.`,
			figures: { long: rests.long, short: rests.short },
			starts: context.starts.slice(-5),
			show: { signals: ['capacity'], from: 0, to: 180 }
		};
	}
};

export const lowOil: SuspectRow = {
	key: 'low-oil',
	family: 'oil',
	applies: screw,
	clues: [
		figureClue({
			key: 'over-staged-start',
			readAt: 'start',
			weight: 0.5,
			discriminates: true,
			applies: oilMoved,
			what: 'Capacity at start',
			quantity: 'percent',
			figure: 'startCapacity',
			needs: ['capacity'],
			of: telling,
			// 55–65 % instead of 40–50 %: common practice, no source.
			strength: (value, context) => {
				const over = context.limit('startCapacityOverStaged') ?? 55;
				return plateau(value, over - 3.5, over + 1.5, over + 12, over + 17);
			},
			show: { signals: ['capacity', 'demand'], from: 0, to: 180 }
		}),
		stallNearFull,
		stallsAsOilChanges,
		moreLoadedAfterRests,
		figureClue({
			key: 'oil-hot',
			weight: 0.25,
			what: 'Settled oil temperature',
			quantity: 'temperature',
			figure: 'settledOilTemp',
			needs: ['oilTemp'],
			// Usual upper end 130–140 °F (54–60 °C), which overlaps with oil-starved: alone no clue. Common practice.
			strength: (value, context) => {
				const high = context.limit('oilTempUsualHigh') ?? 57;
				return ramp(value, high - 4, high + 3);
			}
		}),
		figureClue({
			key: 'margin-wide',
			weight: 0.3,
			// Air-cooled and direct-expansion machines run wide margins when sound.
			applies: (nature) => (nature.evaporator === 'flooded' && nature.condenser === 'water' ? oilMoved(nature) : 0),
			what: 'Settled margin (oil minus condensing)',
			quantity: 'temperatureDifference',
			figure: 'settledMargin',
			needs: ['margin'],
			strength: (value, context) => {
				const usual = context.limit('marginUsualAtStart') ?? 4.4;
				return ramp(value, usual + 5.5, usual + 9.5);
			}
		}),
		driftClue({
			key: 'oil-temperature-rising',
			weight: 0.4,
			discriminates: true,
			what: 'Settled oil temperature',
			quantity: 'temperatureDifference',
			figure: 'settledOilTemp',
			needs: ['oilTemp'],
			matched: true,
			total: [2, 5]
		}),
		driftClue({
			key: 'capacity-at-start-rising',
			weight: 0.3,
			discriminates: true,
			applies: oilMoved,
			what: 'Capacity at start',
			quantity: 'percent',
			figure: 'startCapacity',
			needs: ['capacity'],
			total: [4, 9]
		}),
		driftClue({
			key: 'margin-rising',
			weight: 0.3,
			discriminates: true,
			what: 'Settled margin at like lift and load',
			quantity: 'temperatureDifference',
			figure: 'settledMargin',
			needs: ['margin'],
			matched: true,
			total: [1.2, 3]
		}),
		figureClue({
			key: 'start-not-over-staged',
			readAt: 'start',
			direction: 'against',
			weight: 0.15,
			applies: oilMoved,
			what: 'Capacity at start is ordinary:',
			quantity: 'percent',
			figure: 'startCapacity',
			needs: ['capacity'],
			of: telling,
			strength: (value, context) => ramp(value, 54, 50) * (1 - oilHasChanged(context))
		}),
		figureClue({
			key: 'start-fully-loaded',
			readAt: 'start',
			direction: 'against',
			weight: 0.45,
			applies: oilMoved,
			what: 'Capacity at start is beyond what low oil gives:',
			quantity: 'percent',
			figure: 'startCapacity',
			needs: ['capacity'],
			of: telling,
			strength: (value) => ramp(value, 68, 74)
		}),
		figureClue({
			key: 'oil-ordinary',
			direction: 'against',
			weight: 0.25,
			what: 'Settled oil temperature is ordinary:',
			quantity: 'temperature',
			figure: 'settledOilTemp',
			needs: ['oilTemp'],
			// Cool oil only speaks while the margin is ordinary too: cold condenser water cools all oil.
			strength: (value, context) =>
				(1 - oilHasChanged(context)) *
				ramp(value, 52, 47) *
				ramp(context.figure('settledMargin', recent(context, 'settledMargin'))?.value ?? 0, 12, 7)
		}),
		{
			key: 'loads-fully',
			direction: 'against',
			weight: 0.3,
			needs: ['capacity'],
			read: (context) => {
				const runs = capacityRuns(context);
				const full = runs.filter((start) => (start.figures.peakCapacity ?? 0) >= 96);
				if (runs.length < 2) return SILENT;
				return {
					strength: ramp(full.length / runs.length, 0.3, 0.8),
					sentence: `It loads fully: ${full.length} of ${countWords(runs.length, 'long run')} passed 96 %.`,
					figures: { full: full.length, runs: runs.length },
					starts: full.slice(-5)
				};
			}
		},
		checkClue('oil-level-low', 'for', (context) => {
			const check = latestCheck(context, oilLevel);
			if (!check || check.lowMm === null || check.heightMm >= check.lowMm) return null;
			return {
				at: check.at,
				half: check.indicative,
				strength: 1,
				sentence: `Oil level read at ${Math.round(check.heightMm)} mm, under the unit's band from ${Math.round(check.lowMm)} mm.`
			};
		}),
		checkClue('oil-level-in-band', 'against', (context) => {
			const check = latestCheck(context, oilLevel);
			if (!check || check.lowMm === null || check.heightMm < check.lowMm) return null;
			return {
				at: check.at,
				half: check.indicative,
				strength: 1,
				sentence: `Oil level read at ${Math.round(check.heightMm)} mm, not under the unit's band.`
			};
		})
	],
	explainedBy: [{ key: 'slide-not-unloading', share: 0.3 }],
	showsWithoutSymptom: true,
	check: {
		key: 'oil-level',
		title:
			'Read the oil level, unit off and settled, against the unit’s own band; then find where the oil went. Do not just add oil.',
		tools: ['sight glass or level gauge', 'rule', 'torch', 'the unit’s manual'],
		cautions: cautionsFor('remoteStart', 'oilReading', 'hot', 'resets'),
		unitOff: true
	}
};

export const oilRestriction: SuspectRow = {
	key: 'oil-restriction',
	family: 'oil',
	applies: always,
	clues: [
		figureClue({
			key: 'oil-colder-than-condensing',
			weight: 0.6,
			discriminates: true,
			what: 'Settled margin (oil minus condensing)',
			quantity: 'temperatureDifference',
			figure: 'settledMargin',
			needs: ['margin'],
			// 4 °F (2.2 K) below condensing or more: common practice, no source.
			strength: (value, context) => {
				const limit = context.limit('lineRestrictionMargin') ?? -2.2;
				return ramp(value, limit + 1.6, limit - 0.3);
			},
			show: { signals: ['oilTemp', 'condSaturation', 'margin'], from: 0, to: 3600 }
		}),
		besideClue({
			key: 'oil-colder-at-trip',
			weight: 0.3,
			discriminates: true,
			what: 'Margin (oil minus condensing)',
			quantity: 'temperatureDifference',
			trace: 'margin',
			window: 'trip minute',
			earliest: 300,
			size: [-0.6, -2.5],
			shift: [-3, -6]
		}),
		oilPressureLost('for', 0.55),
		{
			key: 'filter-drop',
			direction: 'for',
			weight: 0.55,
			discriminates: true,
			needs: ['oilFilterDrop'],
			read: (context) => {
				const drop = context.window('oilFilterDrop', 60, 1200, telling(context));
				if (!drop) return null;
				return {
					strength: ramp(drop.value, 90, 180),
					sentence: `Oil filter drop ${context.words.pressureDifference(drop.value)}, median of ${countWords(drop.starts.length, 'start')}.`,
					figures: { drop: drop.value },
					starts: drop.starts,
					show: { signals: ['oilFilterDrop'], from: 0, to: 1200 }
				};
			}
		},
		{
			key: 'oil-trip-with-difference-built',
			direction: 'for',
			weight: 0.4,
			discriminates: true,
			needs: ['systemDelta'],
			read: (context) => {
				const trips = tripsOfKind(context, 'oil-flow');
				const built = context.window('systemDelta', 45, 600, trips);
				if (!built) return SILENT;
				return {
					strength: ramp(built.value, 180, 320) * ramp(trips.length / context.bad.length, 0.2, 0.6),
					sentence: `${countWords(trips.length, 'oil-flow trip')} although the pressure difference that moves the oil had reached ${context.words.pressureDifference(built.value)}.`,
					figures: { systemDelta: built.value, trips: trips.length },
					starts: built.starts,
					show: { signals: ['condPressure', 'evapPressure', 'oilPressure'], from: 0, to: 300 }
				};
			}
		},
		driftClue({
			key: 'margin-falling',
			weight: 0.3,
			discriminates: true,
			what: 'Settled margin',
			quantity: 'temperatureDifference',
			figure: 'settledMargin',
			needs: ['margin'],
			total: [-2, -5]
		}),
		figureClue({
			key: 'margin-positive',
			direction: 'against',
			weight: 0.5,
			what: 'Settled oil is warmer than condensing by',
			quantity: 'temperatureDifference',
			figure: 'settledMargin',
			needs: ['margin'],
			// Oil may come warm through a blocked line: what its pressure shows goes before its temperature.
			strength: (value, context) => ramp(value, 0.5, 3) * ramp(oilShareLost(context)?.share ?? 0, 0.55, 0.35)
		}),
		checkClue('filter-drop-measured', 'for', (context) => {
			const check = latestCheck(context, (one) => (one.kind === 'oil-filter-drop' ? one : null));
			if (!check) return null;
			const strength = ramp(check.drop, 1.5 * (check.clean ?? 60), 2.5 * (check.clean ?? 60));
			const sentence = `Pressure drop over the oil filter measured at ${context.words.pressureDifference(check.drop)}.`;
			return { at: check.at, half: check.indicative || check.clean === null, strength, sentence };
		}),
		checkClue('filter-drop-clean', 'against', (context) => {
			const check = latestCheck(context, (one) => (one.kind === 'oil-filter-drop' ? one : null));
			if (!check) return null;
			const strength = ramp(check.drop, 1.5 * (check.clean ?? 60), 1.1 * (check.clean ?? 60));
			const sentence = `Pressure drop over the oil filter measured at ${context.words.pressureDifference(check.drop)}, as clean.`;
			return { at: check.at, half: check.indicative || check.clean === null, strength, sentence };
		})
	],
	showsWithoutSymptom: true,
	check: {
		key: 'oil-filter-drop',
		title:
			'Measure the pressure drop over oil filter and strainer, compare feed-line temperature, and see that every oil valve is open.',
		tools: ['two gauges or a differential gauge', 'surface thermometer', 'the unit’s manual'],
		cautions: cautionsFor('hot', 'oilStop', 'remoteStart'),
		unitOff: false
	}
};
