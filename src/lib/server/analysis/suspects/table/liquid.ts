import { cautionsFor } from '../cautions';
import { driftClue, figureClue } from '../clue-builders';
import { always, type SuspectRow } from '../clue-rule';
import { ramp } from '../strength';
import {
	dischargeSuperheatHigh,
	flooded,
	startsAnyTime,
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
		superheatHigh(0.25),
		dischargeSuperheatHigh(0.15),
		figureClue({
			key: 'approach-wide-in-runs',
			weight: 0.15,
			what: 'Settled evaporator approach',
			quantity: 'temperatureDifference',
			figure: 'evapApproach',
			needs: ['evapApproach'],
			of: (context) => context.held,
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
		superheatLow(0.3)
	],
	explainedBy: [{ key: 'evap-saturation-sensor', share: 0.4 }],
	showsWithoutSymptom: true,
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
			key: 'wide-valve-with-good-liquid',
			direction: 'for',
			weight: 0.6,
			discriminates: true,
			needs: ['valvePosition', 'subcooling'],
			read: (context) => {
				const valve = context.figure('meanValvePosition', context.held);
				const liquid = context.figure('settledSubcooling', context.held);
				if (!valve || !liquid) return null;
				return {
					strength: Math.min(ramp(valve.value, 75, 92), ramp(liquid.value, 3, 6)),
					sentence: `Held runs keep the valve at ${context.words.percent(valve.value)} with ${context.words.difference(liquid.value)} of subcooling before the line.`,
					figures: { valve: valve.value, subcooling: liquid.value },
					starts: valve.starts.slice(-5),
					show: { signals: ['valvePosition', 'subcooling'], from: 0, to: 3600 }
				};
			}
		},
		superheatInRuns(0.25),
		superheatHigh(0.15),
		startsAnyTime,
		subcooling('subcooling-missing', 'against', 0.6, [3, 1.2]),
		figureClue({
			key: 'valve-ordinary-in-runs',
			direction: 'against',
			weight: 0.5,
			what: 'Held runs keep an ordinary valve position:',
			quantity: 'percent',
			figure: 'meanValvePosition',
			needs: ['valvePosition'],
			of: (context) => context.held,
			strength: (value) => ramp(value, 82, 65)
		})
	],
	explainedBy: [{ key: 'evap-saturation-sensor', share: 0.4 }],
	check: {
		key: 'drier-drop',
		title: 'Temperature or pressure drop over the drier and every liquid valve; look for frost.',
		tools: ['surface thermometer', 'gauges', 'thermal camera'],
		cautions: cautionsFor('refrigerant', 'trappedLiquid'),
		unitOff: false
	}
};
