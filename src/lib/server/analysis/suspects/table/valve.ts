import { median } from '../../statistics/median';
import { cautionsFor } from '../cautions';
import { countWords } from '../../wording/quantity-words';
import type { FigureKey } from '$lib/model/start';
import { checkClue, figureClue, recent, telling } from '../clue-builders';
import type { Context } from '../context';
import type { Readable } from '../trace-reader';
import { type ClueRule, natureIs, SILENT, type SuspectRow } from '../clue-rule';
import { ramp } from '../strength';
import {
	starvedPattern,
	starvesWithLoadClue,
	dischargeSuperheatHigh,
	dx,
	startsAnyTime,
	subcooling,
	superheatHigh,
	superheatLow,
	valved
} from './feed-clues';
import { freezePoint } from '../../water/properties';
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
		// Wide in every run is a line or a charge short of liquid, not a valve that does not follow.
		const usual = context.figure('meanValvePosition', context.held)?.value ?? 0;
		// A saturation that stands well over the cut-out is not a starved evaporator's.
		const lowAt = context.limit('evapSaturationCutout') ?? freezePoint(context.nature.evapFluid ?? undefined);
		const wide = ramp(end.value, 80, 95) * ramp(usual, 92, 75);
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
			strength: Math.max(wide, tight, flat) * ramp(saturation.value - lowAt, 10, 6),
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
		starvedPattern('some', 'for', 0.25),
		starvedPattern('every', 'against', 0.2),
		starvesWithLoadClue('against', 0.4, false),
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
		{ key: 'low-oil', share: 0.3 },
		{ key: 'slide-not-unloading', share: 0.3 },
		{ key: 'plant-staging', share: 0.6 },
		{ key: 'evap-saturation-sensor', share: 0.4 }
	],
	trips: 'low-side',
	check: {
		key: 'valve-travel',
		title: 'Commanded against actual valve travel; stepper or bulb by its maker’s procedure.',
		tools: ['valve driver or service box of the valve’s maker', 'thermometer', 'gauges'],
		cautions: cautionsFor('freeze', 'refrigerant', 'remoteStart', 'repeat'),
		unitOff: false
	}
};

/** A valve is still finding its place in the first minutes: short runs that did not trip say nothing of it [ours]. */
const longEnough = (context: Context) =>
	recent(context).filter(
		(start) => start.outcome === 'tripped' || start.endedAt === null || start.endedAt - start.startedAt >= 480_000
	);

/** Trips that the controller itself recorded on wet discharge gas. */
const wetTrips = (context: Context) =>
	context.bad.filter((start) => /\bwet\b|low discharge superheat/i.test(start.trip?.text ?? ''));

/** Wet running: of the settled stretch, or of the first ten minutes where no run settles. */
function wetReading(
	key: string,
	weight: number,
	what: string,
	figure: FigureKey,
	trace: Readable,
	ends: (context: Context) => readonly [number, number],
	applies: ClueRule['applies'] & object
): ClueRule {
	return {
		key,
		direction: 'for',
		weight,
		discriminates: true,
		readAt: 'run',
		applies,
		needs: [trace],
		read: (context) => {
			const reading =
				context.figure(figure, recent(context, figure)) ?? context.window(trace, 120, 600, longEnough(context));
			if (!reading) return null;
			return {
				strength: ramp(reading.value, ...ends(context)),
				sentence: `${what} ${context.words.difference(reading.value)}, median of ${countWords(reading.starts.length, 'start')}.`,
				figures: { value: reading.value },
				starts: reading.starts.slice(-5),
				show: { signals: [trace, 'valvePosition'], from: 0, to: 900 }
			};
		}
	};
}

export const valveOverfeeding: SuspectRow = {
	key: 'valve-overfeeding',
	family: 'feed',
	applies: valved,
	clues: [
		wetReading('superheat-near-zero', 0.5, 'Superheat', 'superheat', 'superheat', () => [2.6, 0.8], dx),
		wetReading(
			'discharge-superheat-low',
			0.55,
			'Discharge superheat',
			'settledDischargeSuperheat',
			'dischargeSuperheat',
			(context) => (context.nature.evaporator === 'dx' ? [10, 5] : [6, 2.5]),
			// A centrifugal's sound discharge superheat is as low as a wet screw's.
			natureIs('compressor', 'screw', 'scroll', 'reciprocating')
		),
		{
			key: 'wet-gas-trips',
			direction: 'for',
			weight: 0.3,
			discriminates: true,
			needs: [],
			read: (context) => {
				const wet = wetTrips(context);
				if (context.bad.length === 0) return SILENT;
				return {
					strength: ramp(wet.length / context.bad.length, 0.2, 0.6),
					sentence: `${countWords(wet.length, 'trip')} recorded on wet discharge gas.`,
					figures: { trips: wet.length },
					starts: wet.slice(-5)
				};
			}
		},
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
		{
			key: 'superheat-ordinary',
			direction: 'against',
			weight: 0.6,
			needs: ['superheat'],
			readAt: 'run',
			applies: dx,
			read: (context) => {
				// Only settled: in the first minutes of a flooding valve the superheat has not gone yet.
				const reading = context.figure('superheat', recent(context, 'superheat'));
				if (!reading) return SILENT;
				return {
					strength: ramp(reading.value, 2.5, 4),
					sentence: `Superheat is not low: ${context.words.difference(reading.value)}.`,
					figures: { value: reading.value },
					starts: reading.starts.slice(-5)
				};
			}
		},
		{
			key: 'discharge-dry',
			direction: 'against',
			weight: 0.35,
			needs: ['dischargeSuperheat'],
			readAt: 'run',
			applies: dx,
			read: (context) => {
				const reading = context.figure('settledDischargeSuperheat', recent(context, 'settledDischargeSuperheat'));
				if (!reading || wetTrips(context).length > 0) return SILENT;
				return {
					strength: ramp(reading.value, 16, 24),
					sentence: `The discharge stays dry: ${context.words.difference(reading.value)} over condensing.`,
					figures: { value: reading.value },
					starts: reading.starts.slice(-5)
				};
			}
		}
	],
	explainedBy: [{ key: 'suction-temperature-sensor', share: 0.5 }],
	showsWithoutSymptom: true,
	check: {
		key: 'valve-close',
		title: 'Does the valve close to its command? Bulb fixing, level loop, travel by its maker’s procedure.',
		tools: ['thermometer', 'service box of the valve’s maker'],
		cautions: cautionsFor('refrigerant', 'remoteStart'),
		unitOff: false
	}
};
