import { median } from '../../statistics/median';
import { countWords } from '../../wording/quantity-words';
import { cautionsFor } from '../cautions';
import { besideClue, checkClue, driftClue, figureClue, telling } from '../clue-builders';
import { always, type ClueRule, natureIs, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { ramp } from '../strength';
import { latestCheck } from './shared';

const flooded = (context: Context) =>
	context.nature.evaporator === 'flooded' || context.nature.evaporator === 'falling-film';
const dx = natureIs('evaporator', 'dx');
const valved = natureIs('metering', 'electronic-valve', 'thermostatic-valve', 'level');

/** Superheat of the trip minute: beside held starts, or against its usual upper end. */
const superheatHigh = (weight: number): ClueRule =>
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
const dischargeSuperheatHigh = (weight: number): ClueRule =>
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
const superheatLow = (weight: number): ClueRule =>
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

/** Subcooling says on which side of the valve the liquid is missing. */
const subcooling = (
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
const valveWideSettled = (weight: number): ClueRule =>
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
const superheatInRuns = (weight: number, discriminates = false): ClueRule =>
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
const startsAnyTime: ClueRule = {
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

export const suctionRestriction: SuspectRow = {
	key: 'suction-restriction',
	family: 'feed',
	applies: always,
	clues: [
		{
			key: 'suction-under-evaporator',
			direction: 'for',
			weight: 0.5,
			discriminates: true,
			needs: ['evapPressure', 'evapSaturation'],
			read: (context) => {
				const early = context.pressureGap(telling(context), 10, 40);
				const late = context.pressureGap(telling(context), 60, 600);
				if (!early || !late) return null;
				// A gap that grows with flow is a pressure drop; a steady one is a sensor.
				return {
					strength: ramp(late.value - early.value, -1.2, -3),
					sentence: `Saturation from pressure falls ${context.words.difference(early.value - late.value)} further under the logged saturation as the machine loads.`,
					figures: { early: early.value, late: late.value },
					starts: late.starts.slice(-5),
					show: { signals: ['evapPressure', 'evapSaturation', 'capacity'], from: 0, to: 600 }
				};
			}
		}
	],
	check: {
		key: 'suction-valves',
		title: 'Service valves fully open, suction screen, pressure at the compressor against the evaporator.',
		tools: ['two gauges', 'valve key'],
		cautions: cautionsFor('refrigerant', 'remoteStart'),
		unitOff: false
	}
};

export const economiserOrInjection: SuspectRow = {
	key: 'economiser-or-injection',
	family: 'feed',
	applies: natureIs('economiser', true),
	clues: [
		{
			key: 'step-when-it-opens',
			direction: 'for',
			weight: 0.5,
			discriminates: true,
			needs: ['economiserValve', 'dischargeSuperheat'],
			read: (context) => {
				const steps = context.bad
					.map((start) => stepAtOpening(context, start.startedAt, start.endedAt ?? Infinity))
					.filter((step) => step !== null);
				const step = median(steps);
				if (step === null) return SILENT;
				return {
					strength: ramp(Math.abs(step), 6, 14) * ramp(steps.length / context.bad.length, 0.3, 0.7),
					sentence: `Discharge superheat steps by ${context.words.difference(step)} when the economiser valve opens, in ${countWords(steps.length, 'tripped start')}.`,
					figures: { step },
					starts: context.bad.slice(-5)
				};
			}
		}
	],
	check: {
		key: 'economiser-valve',
		title: 'Economiser or injection solenoid and valve: opens and closes to its command?',
		tools: ['meter', 'thermometer'],
		cautions: cautionsFor('electrical', 'refrigerant', 'remoteStart'),
		unitOff: false
	}
};

/** Change of discharge superheat from the minute before the economiser valve opens to the minute after. */
function stepAtOpening(context: Context, from: number, to: number): number | null {
	const series = context.reader.series('economiserValve');
	if (!series) return null;
	for (let i = 1; i < series.t.length; i++) {
		const at = series.t[i] ?? 0;
		if (at <= from || at >= to) continue;
		if ((series.v[i - 1] ?? NaN) <= 2 && (series.v[i] ?? NaN) > 5) {
			const before = context.reader.median('dischargeSuperheat', at - 60_000, at - 1);
			const after = context.reader.median('dischargeSuperheat', at + 10_000, Math.min(to, at + 90_000));
			return before === null || after === null ? null : after - before;
		}
	}
	return null;
}
