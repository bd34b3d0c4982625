import type { StartRecord } from '$lib/model/start';
import { median } from '../../statistics/median';
import { countWords } from '../../wording/quantity-words';
import { cautionsFor } from '../cautions';
import { besideClue, grew, growthClue, jumpClue, figureClue, recent, telling } from '../clue-builders';
import { always, type ClueRule, natureIs, SILENT, type SuspectRow } from '../clue-rule';
import type { Context, Reading } from '../context';
import { ramp } from '../strength';
import { kindShare, tripsOfKind } from './shared';

const waterCooled = natureIs('condenser', 'water');

/** Usual upper end at full load: 5 °F (2.8 K), from memory (sources); look closer from 2 °F above it. */
const wide = (context: Context): readonly [number, number] => {
	const high = context.limit('condApproachUsualHigh') ?? 2.8;
	return [high + 0.6, high + 2.1];
};

const approachWide = (weight: number, discriminates = true): ClueRule =>
	figureClue({
		key: 'condenser-approach-wide',
		weight,
		discriminates,
		what: 'Settled condenser approach',
		quantity: 'temperatureDifference',
		figure: 'condApproach',
		needs: ['condApproach'],
		applies: waterCooled,
		atFullLoad: true,
		strength: (value, context) => ramp(value, ...wide(context)),
		show: { signals: ['condSaturation', 'condWaterOut', 'condApproach'], from: 0, to: 3600 }
	});

/** Fans that still step hold the head up by themselves: only with all of them on, or warm air, is the gap the coil's. */
function fansAllOn(context: Context, from: number, to: number, air: number): boolean {
	const fans = context.reader.median('fanStage', from, to);
	return fans === null ? air >= 27 : fans >= 95;
}

/** Condensing saturation over the entering air, at full load: 25–30 °F (14–17 K) is common practice, no source. */
function overAir(context: Context): Reading | null {
	return context.gather(recent(context, 'settledCapacity'), (start) => {
		const { settled } = start;
		const load = start.figures.settledCapacity;
		if (!settled || load === null || load < 35) return null;
		const { from, to } = settled;
		const airs = (['condAirIn', 'outdoorTemp'] as const).map((id) => context.reader.median(id, from, to));
		// The warmer of two air readings: one of them may be stuck, or in the shade.
		const air = airs.every((one) => one === null) ? null : Math.max(...airs.map((one) => one ?? -Infinity));
		const saturation = context.reader.median('condSaturation', from, to);
		if (air === null || saturation === null || !fansAllOn(context, from, to, air)) return null;
		return (saturation - air) / (Math.min(100, load) / 100);
	});
}
const airCooled = natureIs('condenser', 'air');
const overAirClue = (direction: 'for' | 'against', weight: number): ClueRule => ({
	key: direction === 'for' ? 'condensing-far-over-air' : 'condensing-ordinary-over-air',
	direction,
	weight,
	discriminates: direction === 'for',
	readAt: 'run',
	applies: (nature) => (airCooled(nature) === 1 ? 1 : 0),
	needs: ['condSaturation', ['condAirIn', 'outdoorTemp']],
	read: (context) => {
		const reading = overAir(context);
		if (!reading) return null;
		return {
			strength:
				direction === 'for' ? ramp(reading.value, AIR_WIDE, AIR_WIDE + 6) : ramp(reading.value, AIR_WIDE, AIR_WIDE - 3),
			sentence: `Condensing saturation stands ${context.words.difference(reading.value)} over the entering air at full load, median of ${countWords(reading.starts.length, 'start')}.`,
			figures: { overAir: reading.value },
			starts: reading.starts.slice(-8),
			show: { signals: ['condSaturation', 'condAirIn', 'outdoorTemp'], from: 0, to: 3600 }
		};
	}
});
/** From here on a condenser is hotter over its air than usual, K [ours]. */
const AIR_WIDE = 20;

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

/** Water up to 88 °F (31 °C), air up to 104 °F (40 °C), is what machines are built for: common practice, no source. */
const ordinaryCooling = (start: StartRecord) =>
	(start.figures.condWaterInAtStart ?? 0) <= 31 && (start.figures.outdoorAtStart ?? 0) <= 40;

/** High condensing although what cools the condenser is not hot: the heat does not get out. */
const highCondensing: ClueRule = {
	key: 'high-condensing-trips',
	direction: 'for',
	weight: 0.4,
	discriminates: true,
	needs: ['condSaturation'],
	read: (context) => {
		const trips = tripsOfKind(context, 'high-condensing');
		const ordinary = trips.filter(ordinaryCooling);
		const most = median(trips.map((start) => start.figures.maxCondSaturation ?? NaN));
		return {
			strength: ramp(kindShare(context, 'high-condensing'), 0.15, 0.5) * (ordinary.length === trips.length ? 1 : 0.5),
			sentence: `${countWords(trips.length, 'trip')} on high condensing, at ${context.words.temperature(most)}, ${ordinary.length} of them without hot water or air.`,
			figures: { trips: trips.length, ordinary: ordinary.length, ...(most === null ? {} : { condSaturation: most }) },
			starts: trips.slice(-5),
			show: { signals: ['condSaturation', 'condWaterIn', 'condWaterOut'], from: 0, to: 1800 }
		};
	}
};

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
		highCondensing,
		jumpClue({
			key: 'condenser-approach-jumped',
			weight: 0.6,
			what: 'Settled condenser approach',
			quantity: 'temperatureDifference',
			figure: 'condApproach',
			needs: ['condApproach']
		}),
		growthClue({
			key: 'condenser-approach-growing',
			weight: 0.45,
			discriminates: true,
			what: 'Settled condenser approach',
			quantity: 'temperatureDifference',
			figure: 'condApproach',
			needs: ['condApproach'],
			factor: [1.3, 1.7],
			by: [0.4, 0.9]
		}),
		overAirClue('for', 0.6),
		overAirClue('against', 0.6),
		figureClue({
			key: 'condenser-approach-ordinary',
			direction: 'against',
			weight: 0.8,
			applies: waterCooled,
			what: 'Settled condenser approach is ordinary:',
			quantity: 'temperatureDifference',
			figure: 'condApproach',
			needs: ['condApproach'],
			atFullLoad: true,
			strength: (value, context) =>
				grew(context, 'condApproach')
					? 0
					: (1 - kindShare(context, 'high-condensing')) * ramp(value, wide(context)[0], wide(context)[0] - 0.6)
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
		// A warmer evaporator feeds the condenser through the standing valve: then its saturation says nothing of gas.
		const evaporator = context.reader.median('evapSaturation', from, to);
		const saturation = context.reader.median('condSaturation', from, to);
		const water = context.reader.median('condWaterIn', from, to);
		if (evaporator !== null && water !== null && evaporator > water + 0.5) continue;
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
		approachWide(0.2, false),
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
