import { cautionsFor } from '../cautions';
import { besideClue, checkClue, grew, growthClue, jumpClue, figureClue } from '../clue-builders';
import { always, type ClueRule, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { restOffset } from '../rest-readings';
import { ramp } from '../strength';
import { flooded } from './feed-clues';
import { latestCheck } from './shared';

/**
 * Usual upper end of the settled evaporator approach: 4 °F flooded, 10 °F direct expansion, from memory (sources). The
 * wider one where nobody said which it is.
 */
function usualHigh(context: Context): number {
	return context.limit('evapApproachUsualHigh') ?? (flooded(context) ? 2.3 : 5.6);
}

/** Where a full-load approach begins to be wide, and where it surely is: 1.35 and 2 times the usual upper end [ours]. */
const wide = (context: Context): readonly [number, number] => [1.35 * usualHigh(context), 2 * usualHigh(context)];

const approachWide = (weight: number, discriminates: boolean): ClueRule =>
	figureClue({
		key: 'evaporator-approach-wide',
		applies: (nature) => (nature.evaporator ? 1 : 0.5),
		weight,
		discriminates,
		what: 'Settled evaporator approach',
		quantity: 'temperatureDifference',
		figure: 'evapApproach',
		needs: ['evapApproach'],
		atFullLoad: true,
		strength: (value, context) => ramp(value, ...wide(context)),
		show: { signals: ['evapWaterOut', 'evapSaturation', 'evapApproach'], from: 0, to: 3600 }
	});
const approachOrdinary = (weight: number): ClueRule =>
	figureClue({
		key: 'evaporator-approach-ordinary',
		direction: 'against',
		weight,
		what: 'Settled evaporator approach is ordinary:',
		quantity: 'temperatureDifference',
		figure: 'evapApproach',
		needs: ['evapApproach'],
		atFullLoad: true,
		strength: (value, context) =>
			grew(context, 'evapApproach') ? 0 : ramp(value, wide(context)[0], wide(context)[0] * 0.8)
	});
/** A starved shell has hot suction and discharge as well; a fouled one does not. */
const superheatOrdinary = (weight: number): ClueRule =>
	figureClue({
		key: 'superheat-not-raised',
		weight,
		what: 'Settled superheat stays ordinary:',
		quantity: 'temperatureDifference',
		figure: 'superheat',
		needs: ['superheat'],
		of: (context) => context.starts,
		strength: (value, context) => (flooded(context) ? ramp(value, 7, 4) : ramp(value, 10, 7))
	});
const starved: ClueRule = besideClue({
	key: 'superheat-high-instead',
	direction: 'against',
	weight: 0.35,
	what: 'Superheat is high, as in a starved evaporator:',
	quantity: 'temperatureDifference',
	trace: 'superheat',
	window: 'trip minute',
	size: (context) => (flooded(context) ? [7, 11] : [10, 14]),
	shift: [3, 6]
});
const sensorExplains: ClueRule = {
	key: 'saturation-off-at-rest-too',
	direction: 'against',
	weight: 0.6,
	needs: ['evapSaturation', 'evapWaterOut'],
	read: (context) => {
		const rest = restOffset(context, 'logged');
		if (!rest) return SILENT;
		return {
			strength: ramp(-rest.value, 0.8, 1.7),
			sentence: `Saturation stands ${context.words.difference(rest.value)} off the water at rest too: the approach may be the sensor's.`,
			figures: { offset: rest.value },
			starts: rest.rests.slice(-5)
		};
	}
};

export const fouledEvaporator: SuspectRow = {
	key: 'fouled-evaporator',
	family: 'water',
	applies: always,
	clues: [
		approachWide(0.55, true),
		superheatOrdinary(0.15),
		jumpClue({
			key: 'evaporator-approach-jumped',
			weight: 0.6,
			what: 'Settled evaporator approach',
			quantity: 'temperatureDifference',
			figure: 'evapApproach',
			needs: ['evapApproach']
		}),
		growthClue({
			key: 'evaporator-approach-growing',
			weight: 0.4,
			discriminates: true,
			what: 'Settled evaporator approach',
			quantity: 'temperatureDifference',
			figure: 'evapApproach',
			needs: ['evapApproach'],
			factor: [1.3, 1.7],
			by: [0.5, 1.2]
		}),
		approachOrdinary(0.8),
		starved,
		sensorExplains
	],
	explainedBy: [
		{ key: 'evap-saturation-sensor', share: 0.4 },
		{ key: 'low-refrigerant-charge', share: 0.4 },
		{ key: 'valve-underfeeding', share: 0.3 }
	],
	showsWithoutSymptom: true,
	trips: 'low-side',
	check: {
		key: 'evaporator-approach',
		title: 'Evaporator approach at matched load and flow; oil-logging test; water treatment record.',
		tools: ['reference thermometer', 'calibrated gauge', 'differential gauge'],
		cautions: cautionsFor('freeze', 'protections', 'refrigerant'),
		unitOff: false
	}
};

export const oilInEvaporator: SuspectRow = {
	key: 'oil-in-evaporator',
	family: 'oil',
	applies: always,
	clues: [
		approachWide(0.2, false),
		superheatOrdinary(0.05),
		{
			key: 'oil-added-and-gone',
			direction: 'for',
			weight: 0.5,
			discriminates: true,
			needs: [],
			read: (context) => {
				const added = context.changes.filter((change) => change.aimedAt.includes('low-oil'));
				const low = latestCheck(context, (check) => (check.kind === 'oil-level' ? check : null));
				const later = added.filter((change) => low !== null && low.at > change.at);
				if (!low || low.lowMm === null || low.heightMm >= low.lowMm || later.length === 0) return SILENT;
				return {
					strength: 1,
					sentence: 'Oil was added before, and the level is under its band again.',
					figures: { heightMm: low.heightMm },
					starts: []
				};
			}
		},
		checkClue('separator-level-low', 'for', (context) => {
			const check = latestCheck(context, (one) => (one.kind === 'oil-level' ? one : null));
			const approach = context.atFullLoad('evapApproach', context.starts);
			if (!check || check.lowMm === null || check.heightMm >= check.lowMm || !approach) return null;
			const strength = 0.6 * ramp(approach.value, ...wide(context));
			const sentence = `Separator level low while the evaporator approach is ${context.words.difference(approach.value)}.`;
			return { at: check.at, half: check.indicative, strength, sentence };
		}),
		approachOrdinary(0.6),
		sensorExplains
	],
	explainedBy: [{ key: 'evap-saturation-sensor', share: 0.4 }],
	check: {
		key: 'oil-return',
		title: 'Oil return, eductor and filter; oil sample; where is the oil?',
		tools: ['sight glass', 'surface thermometer', 'sample bottle'],
		cautions: cautionsFor('oilReading', 'refrigerant', 'hot'),
		unitOff: true
	}
};
