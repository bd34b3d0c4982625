import { cautionsFor } from '../cautions';
import { driftClue, figureClue, recent } from '../clue-builders';
import { always, type SuspectRow } from '../clue-rule';
import { ramp } from '../strength';
import { countWords } from '../../wording/quantity-words';
import {
	dischargeSuperheatHigh,
	dx,
	flooded,
	starvedPattern,
	starvedShare,
	starvesWithLoadClue,
	subcooling,
	superheatHigh,
	superheatInRuns,
	superheatLow,
	valveWideSettled
} from './feed-clues';

export const lowRefrigerantCharge: SuspectRow = {
	key: 'low-refrigerant-charge',
	family: 'feed',
	applies: always,
	clues: [
		subcooling('subcooling-low', 'for', 0.65, [3, 1.2], true),
		valveWideSettled(0.25),
		superheatInRuns(0.25),
		superheatHigh(0.2, false),
		dischargeSuperheatHigh(0.1, false),
		starvedPattern('every', 'for', 0.15),
		figureClue({
			key: 'approach-wide-in-runs',
			weight: 0.15,
			what: 'Settled evaporator approach',
			quantity: 'temperatureDifference',
			figure: 'evapApproach',
			needs: ['evapApproach'],
			strength: (value, context) => (flooded(context) ? ramp(value, 2.8, 5) : ramp(value, 6, 9))
		}),
		driftClue({
			key: 'subcooling-falling',
			weight: 0.3,
			discriminates: true,
			what: 'Settled subcooling',
			quantity: 'temperatureDifference',
			figure: 'settledSubcooling',
			needs: ['subcooling'],
			total: [-1, -3]
		}),
		subcooling('subcooling-healthy', 'against', 0.8, [2.5, 4.5]),
		superheatLow(0.3),
		figureClue({
			key: 'superheat-low-in-runs',
			direction: 'against',
			weight: 0.5,
			applies: dx,
			what: 'Settled superheat is low, so the liquid is in the evaporator, not missing:',
			quantity: 'temperatureDifference',
			figure: 'superheat',
			needs: ['superheat'],
			strength: (value) => ramp(value, 2.5, 1)
		})
	],
	explainedBy: [{ key: 'evap-saturation-sensor', share: 0.4 }],
	showsWithoutSymptom: true,
	trips: 'low-side',
	check: {
		key: 'leak-search',
		title: 'Leak search; subcooling at a steady load; the charge is weighed when it is recovered.',
		tools: ['leak detector', 'gauges', 'thermometer', 'recovery set and scale'],
		cautions: cautionsFor('refrigerant', 'trappedLiquid', 'pressureTest', 'freeze'),
		unitOff: false
	}
};

export const liquidLineRestriction: SuspectRow = {
	key: 'liquid-line-restriction',
	family: 'feed',
	applies: always,
	clues: [
		{
			key: 'starved-with-good-liquid',
			direction: 'for',
			weight: 0.6,
			discriminates: true,
			readAt: 'run',
			needs: ['superheat', 'subcooling'],
			read: (context) => {
				const starved = starvedShare(context);
				const liquid =
					context.figure('settledSubcooling', recent(context, 'settledSubcooling')) ??
					context.window('subcooling', 45, 600, recent(context));
				if (!starved || !liquid || starved.all < 4) return null;
				return {
					strength: ramp(starved.starved / starved.all, 0.7, 0.95) * ramp(liquid.value, 2.5, 4.5),
					sentence: `${starved.starved} of ${countWords(starved.all, 'start')} ran starved with ${context.words.difference(liquid.value)} of subcooling before the line.`,
					figures: { starved: starved.starved, starts: starved.all, subcooling: liquid.value },
					starts: liquid.starts.slice(-5),
					show: { signals: ['superheat', 'subcooling', 'valvePosition'], from: 0, to: 900 }
				};
			}
		},
		valveWideSettled(0.25),
		superheatInRuns(0.25),
		superheatHigh(0.1, false),
		subcooling('subcooling-missing', 'against', 0.6, [3, 1.2]),
		starvedPattern('some', 'against', 0.25),
		starvesWithLoadClue('for', 0.55, true)
	],
	explainedBy: [{ key: 'evap-saturation-sensor', share: 0.4 }],
	showsWithoutSymptom: true,
	trips: 'low-side',
	check: {
		key: 'drier-drop',
		title: 'Temperature or pressure drop over the drier and every liquid valve; look for frost.',
		tools: ['surface thermometer', 'gauges', 'thermal camera'],
		cautions: cautionsFor('refrigerant', 'trappedLiquid'),
		unitOff: false
	}
};
