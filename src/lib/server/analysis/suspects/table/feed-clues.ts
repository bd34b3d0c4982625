import { countWords } from '../../wording/quantity-words';
import { besideClue, figureClue, recent } from '../clue-builders';
import { type ClueRule, natureIs, SILENT } from '../clue-rule';
import type { StartRecord } from '$lib/model/start';
import type { Context } from '../context';
import { type Band, loadBands } from '../load-bands';
import { ramp } from '../strength';

export const flooded = (context: Context) =>
	context.nature.evaporator === 'flooded' || context.nature.evaporator === 'falling-film';
export const dx = natureIs('evaporator', 'dx');
export const valved = natureIs('metering', 'electronic-valve', 'thermostatic-valve', 'level');

/** Superheat of the trip minute: beside held starts, or against its usual upper end. */
export const superheatHigh = (weight: number, discriminates = true): ClueRule =>
	besideClue({
		key: 'superheat-high',
		weight,
		discriminates,
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
export const dischargeSuperheatHigh = (weight: number, discriminates = true): ClueRule =>
	besideClue({
		key: 'discharge-superheat-high',
		weight,
		discriminates,
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

/** A light load subcools little on a sound machine: runs under 45 % capacity say nothing of the charge [ours]. */
const loaded = (starts: readonly StartRecord[]): StartRecord[] =>
	starts.filter((start) => start.figures.settledCapacity === null || start.figures.settledCapacity >= 45);

/** Seconds from the start before which the condenser's liquid says nothing of the charge [ours]. */
const SUBCOOLS_FROM = 120;

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
		const settled = context.figure('settledSubcooling', loaded(recent(context, 'settledSubcooling')));
		const reading = settled ?? context.tripMinute('subcooling', SUBCOOLS_FROM);
		if (!reading) return null;
		return {
			// Before a run settles the condenser is still filling: it counts half.
			strength: ramp(reading.value, ...ends) * (settled ? 1 : 0.5),
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

/** Superheat from which an evaporator is starved, whatever starts it is compared with. */
export const starvedFrom = (context: Context): number =>
	(context.limit('superheatUsualHigh') ?? (flooded(context) ? 6 : 9)) + 1.5;

/** Highest superheat of the last half minute before a stop: a median over the dive would halve it. */
function highestSuperheat(context: Context, start: StartRecord, end: number): number | null {
	const step = Math.max(5, start.spacingSeconds);
	let highest: number | null = null;
	for (let at = Math.max(30, end - Math.max(30, 1.2 * step)); at < end; at += step) {
		const value = context.window('superheat', at, Math.min(end, at + step), [start])?.value ?? null;
		if (value !== null && (highest === null || value > highest)) highest = value;
	}
	return highest;
}

/** How many starts were starved at the end of their first ten minutes, or when they stopped before. */
export function starvedShare(context: Context): { starved: number; all: number } | null {
	const reading = context.gather(context.starts, (start) => {
		const end = Math.min(600, ((start.endedAt ?? Infinity) - start.startedAt) / 1000);
		const from = Math.max(30, end - Math.max(60, 2 * start.spacingSeconds));
		if (end < 45) return null;
		if (start.outcome === 'tripped') return highestSuperheat(context, start, end);
		return context.window('superheat', from, end, [start])?.value ?? null;
	});
	if (!reading) return null;
	return { starved: reading.values.filter((value) => value > starvedFrom(context)).length, all: reading.values.length };
}

/**
 * How clearly the evaporator starves only as the mass flow rises, 0…1: ordinary superheat at light load, high at heavy
 * load with the valve wide open. A line or a charge that is short does this; a valve that sticks starves at light load too.
 */
export function starvesWithLoad(context: Context): { strength: number; low: Band; high: Band } | null {
	const bands = loadBands(context);
	if (!bands) return null;
	const { low, high } = bands;
	const from = starvedFrom(context);
	const valve = high.valve === null ? 1 : ramp(high.valve, 75, 92);
	const strength =
		ramp(high.superheat, from - 3, from + 0.5) *
		ramp(high.superheat - low.superheat, 1.5, 4) *
		ramp(low.superheat, from + 2, from) *
		valve;
	return { strength, low, high };
}

export const starvesWithLoadClue = (
	direction: 'for' | 'against',
	weight: number,
	liquidMatters: boolean
): ClueRule => ({
	key: 'starves-as-it-loads',
	direction,
	weight,
	discriminates: direction === 'for',
	readAt: 'run',
	needs: liquidMatters ? ['superheat', 'capacity', 'subcooling'] : ['superheat', 'capacity'],
	read: (context) => {
		const found = starvesWithLoad(context);
		if (!found) return SILENT;
		const liquid = found.high.subcooling ?? found.low.subcooling;
		return {
			strength: found.strength * (liquidMatters ? ramp(liquid ?? 0, 2, 4) : 1),
			sentence: `Superheat ${context.words.difference(found.low.superheat)} at light and ${context.words.difference(found.high.superheat)} at heavy load${found.high.valve === null ? '' : ` with the valve at ${context.words.percent(found.high.valve)}`}: it starves as the mass flow rises.`,
			figures: { light: found.low.superheat, heavy: found.high.superheat },
			starts: context.starts.slice(-5),
			show: { signals: ['superheat', 'valvePosition', 'capacity', 'subcooling'], from: 0, to: 1200 }
		};
	}
});

/** A valve that sticks starves some starts; a restricted line or a lack of refrigerant starves every one. */
export const starvedPattern = (pattern: 'every' | 'some', direction: 'for' | 'against', weight: number): ClueRule => ({
	key: pattern === 'every' ? 'starved-at-every-start' : 'starved-at-some-starts',
	direction,
	weight,
	needs: ['superheat'],
	read: (context) => {
		const count = starvedShare(context);
		if (!count || count.all < 4) return SILENT;
		const share = count.starved / count.all;
		return {
			strength:
				pattern === 'every'
					? ramp(share, 0.8, 0.95)
					: Math.min(ramp(share, 0.05, 0.15), ramp(share, 0.92, 0.8)) * (1 - (starvesWithLoad(context)?.strength ?? 0)),
			sentence: `${count.starved} of ${countWords(count.all, 'start')} ran starved (superheat over ${context.words.difference(starvedFrom(context))}) at ten minutes or when they stopped.`,
			figures: { starved: count.starved, starts: count.all },
			starts: context.starts.slice(-5),
			show: { signals: ['superheat', 'valvePosition'], from: 0, to: 600 }
		};
	}
});
