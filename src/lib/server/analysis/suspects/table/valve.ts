import { median } from '../../statistics/median';
import { cautionsFor } from '../cautions';
import { checkClue, figureClue, telling } from '../clue-builders';
import { type ClueRule, SILENT, type SuspectRow } from '../clue-rule';
import { ramp } from '../strength';
import {
	dischargeSuperheatHigh,
	dx,
	startsAnyTime,
	subcooling,
	superheatHigh,
	superheatLow,
	valved
} from './feed-clues';
import { latestCheck } from './shared';

const valveWithoutEffect: ClueRule = {
	key: 'valve-without-effect',
	direction: 'for',
	weight: 0.45,
	discriminates: true,
	applies: valved,
	needs: ['valvePosition', 'evapSaturation'],
	read: (context) => {
		const end = context.tripMinute('valvePosition');
		const saturation = context.tripMinute('evapSaturation');
		if (!end || !saturation) return null;
		const wide = ramp(end.value, 80, 95);
		const tight = end.shift === null || end.heldCount < 2 ? 0 : ramp(end.shift, -6, -18);
		const moved = context.bad.map((start) => {
			const values = context.reader.values('valvePosition', start.startedAt, (start.endedAt ?? start.startedAt) - 500);
			return values.length < 3 ? null : Math.max(...values) - Math.min(...values);
		});
		const travel = median(moved.filter((one) => one !== null));
		const flat = travel === null ? 0 : 0.8 * ramp(travel, 4, 1.5);
		const state =
			wide >= Math.max(tight, flat)
				? 'stood wide open'
				: tight >= flat
					? 'stayed tighter than in held starts'
					: 'did not move';
		return {
			strength: Math.max(wide, tight, flat),
			sentence: `The valve ${state} (${context.words.percent(end.value)}) while evaporator saturation fell to ${context.words.temperature(saturation.value)}.`,
			figures: { valve: end.value, evapSaturation: saturation.value, ...(travel === null ? {} : { travel }) },
			starts: end.starts,
			show: { signals: ['valvePosition', 'evapSaturation', 'superheat'], from: 0, to: 300 }
		};
	}
};

const overCapacity = (weight: number): ClueRule =>
	figureClue({
		key: 'over-capacity-explains',
		direction: 'against',
		weight,
		what: 'Capacity at start already asks for more than the evaporator gives:',
		quantity: 'percent',
		figure: 'startCapacity',
		needs: ['capacity'],
		of: telling,
		strength: (value) => ramp(value, 58, 68)
	});

export const valveUnderfeeding: SuspectRow = {
	key: 'valve-underfeeding',
	family: 'feed',
	applies: valved,
	clues: [
		superheatHigh(0.45),
		dischargeSuperheatHigh(0.35),
		valveWithoutEffect,
		subcooling('liquid-backed-up', 'for', 0.25, [2.5, 5]),
		startsAnyTime,
		superheatLow(0.5),
		subcooling('no-liquid-before-valve', 'against', 0.5, [2.2, 0.8]),
		overCapacity(0.45),
		checkClue('valve-travel-short', 'for', (context) => {
			const check = latestCheck(context, (one) => (one.kind === 'valve-travel' ? one : null));
			if (!check) return null;
			const sentence = `Valve commanded to ${context.words.percent(check.commanded)} was found at ${context.words.percent(check.actual)}.`;
			return { at: check.at, half: check.indicative, strength: ramp(check.commanded - check.actual, 6, 15), sentence };
		}),
		checkClue('valve-travel-good', 'against', (context) => {
			const check = latestCheck(context, (one) => (one.kind === 'valve-travel' ? one : null));
			if (!check) return null;
			const sentence = `Valve commanded to ${context.words.percent(check.commanded)} was found at ${context.words.percent(check.actual)}.`;
			const off = Math.abs(check.commanded - check.actual);
			return { at: check.at, half: check.indicative, strength: ramp(off, 5, 2), sentence };
		})
	],
	explainedBy: [
		{ key: 'cold-condenser-water', share: 0.5 },
		{ key: 'low-refrigerant-charge', share: 0.4 },
		{ key: 'liquid-line-restriction', share: 0.3 },
		{ key: 'evap-saturation-sensor', share: 0.4 }
	],
	check: {
		key: 'valve-travel',
		title: 'Commanded against actual valve travel; stepper or bulb by its maker’s procedure.',
		tools: ['valve driver or service box of the valve’s maker', 'thermometer', 'gauges'],
		cautions: cautionsFor('freeze', 'refrigerant', 'remoteStart', 'repeat'),
		unitOff: false
	}
};

export const valveOverfeeding: SuspectRow = {
	key: 'valve-overfeeding',
	family: 'feed',
	applies: valved,
	clues: [
		figureClue({
			key: 'superheat-near-zero',
			weight: 0.4,
			discriminates: true,
			applies: dx,
			what: 'Settled superheat',
			quantity: 'temperatureDifference',
			figure: 'superheat',
			needs: ['superheat'],
			of: (context) => context.starts,
			strength: (value) => ramp(value, 3, 1)
		}),
		figureClue({
			key: 'discharge-superheat-low',
			weight: 0.4,
			discriminates: true,
			what: 'Settled discharge superheat',
			quantity: 'temperatureDifference',
			figure: 'settledDischargeSuperheat',
			needs: ['dischargeSuperheat'],
			of: (context) => context.starts,
			strength: (value) => ramp(value, 7, 3)
		}),
		{
			key: 'valve-hunting',
			direction: 'for',
			weight: 0.2,
			needs: ['valvePosition'],
			read: (context) => {
				const spans = context.starts
					.filter((start) => start.settled !== null)
					.map((start) => {
						const values = context.reader.values('valvePosition', start.settled?.from ?? 0, start.settled?.to ?? 0);
						return values.length < 20 ? null : Math.max(...values) - Math.min(...values);
					})
					.filter((span) => span !== null);
				const span = median(spans);
				if (span === null) return SILENT;
				return {
					strength: ramp(span, 20, 45),
					sentence: `The valve swings over ${context.words.percent(span)} in settled runs.`,
					figures: { span },
					starts: []
				};
			}
		},
		figureClue({
			key: 'discharge-superheat-ordinary',
			direction: 'against',
			weight: 0.6,
			what: 'Settled discharge superheat is not low:',
			quantity: 'temperatureDifference',
			figure: 'settledDischargeSuperheat',
			needs: ['dischargeSuperheat'],
			of: (context) => context.starts,
			strength: (value) => ramp(value, 6, 11)
		})
	],
	check: {
		key: 'valve-close',
		title: 'Does the valve close to its command? Bulb fixing, level loop, travel by its maker’s procedure.',
		tools: ['thermometer', 'service box of the valve’s maker'],
		cautions: cautionsFor('refrigerant', 'remoteStart'),
		unitOff: false
	}
};
