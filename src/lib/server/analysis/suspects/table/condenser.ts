import type { StartRecord } from '$lib/model/start';
import { median } from '../../statistics/median';
import { countWords } from '../../wording/quantity-words';
import { cautionsFor } from '../cautions';
import { besideClue, driftClue, figureClue, telling } from '../clue-builders';
import { always, type ClueRule, natureIs, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { ramp } from '../strength';
import { kindShare, tripsOfKind } from './shared';

const waterCooled = natureIs('condenser', 'water');

const approachWide = (weight: number): ClueRule =>
	figureClue({
		key: 'condenser-approach-wide',
		weight,
		discriminates: true,
		what: 'Settled condenser approach',
		quantity: 'temperatureDifference',
		figure: 'condApproach',
		needs: ['condApproach'],
		applies: waterCooled,
		of: (context) => context.starts,
		// 1–5 °F (0.6–2.8 K) at full load: from memory, see sources; look closer 2 °F above.
		strength: (value, context) => {
			const high = context.limit('condApproachUsualHigh') ?? 2.8;
			return ramp(value, high + 0.6, high + 2.2);
		},
		show: { signals: ['condSaturation', 'condWaterOut', 'condApproach'], from: 0, to: 3600 }
	});

/** Trips on high condensing when the approach could not settle: read in the trip minute. */
const approachAtTrip: ClueRule = besideClue({
	key: 'condenser-approach-at-trip',
	weight: 0.4,
	discriminates: true,
	what: 'Condenser approach',
	quantity: 'temperatureDifference',
	trace: 'condApproach',
	window: 'trip minute',
	earliest: 240,
	applies: waterCooled,
	size: [4.5, 8],
	shift: [1.5, 4]
});

export const fouledCondenser: SuspectRow = {
	key: 'fouled-condenser',
	family: 'high-side',
	applies: always,
	clues: [
		approachWide(0.6),
		{
			...approachAtTrip,
			read: (context) => (kindShare(context, 'high-condensing') > 0.2 ? approachAtTrip.read(context) : SILENT)
		},
		{
			key: 'high-condensing-trips',
			direction: 'for',
			weight: 0.3,
			needs: ['condSaturation'],
			read: (context) => {
				const share = kindShare(context, 'high-condensing');
				const trips = tripsOfKind(context, 'high-condensing');
				const most = median(trips.map((start) => start.figures.maxCondSaturation ?? NaN));
				return {
					strength: ramp(share, 0.2, 0.6),
					sentence: `${countWords(trips.length, 'trip')} on high condensing, at ${context.words.temperature(most)}.`,
					figures: { trips: trips.length, ...(most === null ? {} : { condSaturation: most }) },
					starts: trips.slice(-5),
					show: { signals: ['condSaturation', 'condWaterIn', 'condWaterOut'], from: 0, to: 1800 }
				};
			}
		},
		driftClue({
			key: 'condenser-approach-growing',
			weight: 0.3,
			what: 'Settled condenser approach',
			quantity: 'temperatureDifference',
			figure: 'condApproach',
			needs: ['condApproach'],
			total: [0.6, 1.8]
		}),
		figureClue({
			key: 'condenser-approach-ordinary',
			direction: 'against',
			weight: 0.8,
			what: 'Settled condenser approach is ordinary:',
			quantity: 'temperatureDifference',
			figure: 'condApproach',
			needs: ['condApproach'],
			of: (context) => context.starts,
			strength: (value, context) =>
				ramp(
					value,
					(context.limit('condApproachUsualHigh') ?? 2.8) + 0.6,
					context.limit('condApproachUsualHigh') ?? 2.8
				)
		})
	],
	explainedBy: [{ key: 'non-condensables', share: 0.6 }],
	showsWithoutSymptom: true,
	check: {
		key: 'condenser-approach',
		title: 'Condenser approach at matched load and flow; condenser flow; a brush sample of the tubes.',
		tools: ['reference thermometer', 'gauges', 'differential gauge'],
		cautions: cautionsFor('remoteStart', 'protections', 'hot'),
		unitOff: false
	}
};

/** Condensing saturation over condenser water at rest, with its pump on. */
function restGap(context: Context): { value: number; rests: StartRecord[] } | null {
	const found: { start: StartRecord; value: number }[] = [];
	for (const start of context.starts) {
		if ((start.restSeconds ?? 0) < 1800) continue;
		const [from, to] = [start.startedAt - 180_000, start.startedAt - 1];
		const pump = context.reader.values('condPumpRun', from, to);
		if (pump.length === 0 || pump.some((value) => value !== 1)) continue;
		const saturation = context.reader.median('condSaturation', from, to);
		const water = context.reader.median('condWaterIn', from, to);
		if (saturation !== null && water !== null) found.push({ start, value: saturation - water });
	}
	const value = median(found.map((one) => one.value));
	return value === null || found.length < 3 ? null : { value, rests: found.map((one) => one.start) };
}

const restTest = (direction: 'for' | 'against', weight: number): ClueRule => ({
	key: direction === 'for' ? 'condenser-rest-test-positive' : 'condenser-rest-test-passed',
	readAt: 'rest',
	direction,
	weight,
	discriminates: direction === 'for',
	needs: ['condSaturation', 'condWaterIn', 'condPumpRun'],
	read: (context) => {
		const rest = restGap(context);
		if (!rest) return null;
		return {
			strength: direction === 'for' ? ramp(rest.value, 1.3, 2.5) : ramp(rest.value, 1, 0.4),
			sentence: `At rest with the condenser pump on, condensing saturation stands ${context.words.difference(rest.value)} over the water, over ${countWords(rest.rests.length, 'rest')}.`,
			figures: { gap: rest.value },
			starts: rest.rests.slice(-5),
			show: { signals: ['condSaturation', 'condWaterIn'], from: -1800, to: 0 }
		};
	}
});

export const nonCondensables: SuspectRow = {
	key: 'non-condensables',
	family: 'high-side',
	applies: waterCooled,
	clues: [
		restTest('for', 0.8),
		{ ...approachWide(0.2), discriminates: false },
		{
			key: 'discharge-hot-too',
			direction: 'for',
			weight: 0.15,
			needs: ['dischargeSuperheat'],
			read: (context) => {
				const reading = context.figure('settledDischargeSuperheat', telling(context));
				if (!reading) return null;
				return {
					strength: ramp(reading.value, 25, 35),
					sentence: `Settled discharge superheat ${context.words.difference(reading.value)}.`,
					figures: { value: reading.value },
					starts: reading.starts
				};
			}
		},
		restTest('against', 0.8)
	],
	showsWithoutSymptom: true,
	check: {
		key: 'condenser-rest-test',
		title: 'Rest test with condenser flow: saturation against the water. Purge by a certified person only.',
		tools: ['calibrated gauge', 'reference thermometer', 'saturation table'],
		cautions: cautionsFor('refrigerant', 'remoteStart'),
		unitOff: true
	}
};
