import type { Series } from '$lib/model/series';
import type { StartRecord } from '$lib/model/start';
import { median } from '../../statistics/median';
import { countWords } from '../../wording/quantity-words';
import { cautionsFor } from '../cautions';
import { figureClue, telling } from '../clue-builders';
import { always, type ClueRule, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { ramp } from '../strength';
import { lowerBound } from '../trace-reader';
import { kindShare, tripsOfKind } from './shared';

const TWO_MINUTES = 120_000;
const runSeconds = (start: StartRecord) => ((start.endedAt ?? Infinity) - start.startedAt) / 1000;

/** Did `running` go on or off within from…to? */
function switches(running: Series, from: number, to: number): boolean {
	for (let i = Math.max(1, lowerBound(running.t, from)); i < running.t.length; i++) {
		if ((running.t[i] ?? Infinity) > to) return false;
		const [before, now] = [running.v[i - 1] ?? NaN, running.v[i] ?? NaN];
		if (Number.isFinite(before) && Number.isFinite(now) && before !== now) return true;
	}
	return false;
}

/** Another machine switched within two minutes of the start, or before the trip. */
function stagedWith(context: Context, start: StartRecord): boolean {
	const from = start.startedAt - TWO_MINUTES;
	const to = Math.min(start.startedAt + TWO_MINUTES, start.endedAt ?? Infinity);
	return context.input.others.some((other) => switches(other.running, from, to));
}

const otherMachine: ClueRule = {
	key: 'another-machine-switches',
	direction: 'for',
	weight: 0.65,
	discriminates: true,
	needs: [],
	read: (context) => {
		if (context.input.others.length === 0 || context.bad.length === 0) return SILENT;
		const bad = context.bad.filter((start) => stagedWith(context, start));
		const held = context.held.filter((start) => stagedWith(context, start));
		const share = bad.length / context.bad.length;
		const usual = context.held.length === 0 ? 0 : held.length / context.held.length;
		return {
			strength: ramp(share, 0.3, 0.7) * ramp(share - usual, 0.15, 0.45),
			sentence: `Another machine switched within 2 min in ${bad.length} of ${countWords(context.bad.length, 'tripped start')} and in ${held.length} of ${countWords(context.held.length, 'held start')}.`,
			figures: { tripped: bad.length, held: held.length },
			starts: bad.slice(-5),
			show: { signals: ['running', 'evapFlow', 'evapWaterIn'], from: -180, to: 300 }
		};
	}
};

/** Greatest swing of flow (or of entering water where flow is not logged) around a start. */
function flowSwing(context: Context, start: StartRecord): number | null {
	const to = Math.min(start.startedAt + 300_000, (start.endedAt ?? Infinity) - 500);
	const flow = context.reader.values('evapFlow', start.startedAt, to);
	if (flow.length < 3) return null;
	const usual = median(flow) ?? 0;
	return usual > 0 ? (Math.max(...flow) - Math.min(...flow)) / Math.max(...flow) : null;
}

const flowSwings: ClueRule = {
	key: 'flow-swings',
	direction: 'for',
	weight: 0.5,
	discriminates: true,
	needs: ['evapFlow'],
	read: (context) => {
		const swing = median(context.bad.map((start) => flowSwing(context, start) ?? NaN));
		const held = median(context.held.slice(-40).map((start) => flowSwing(context, start) ?? NaN)) ?? 0;
		if (swing === null) return null;
		return {
			strength: ramp(swing - held, 0.12, 0.3),
			sentence: `Flow swung by ${Math.round(100 * swing)} % within 5 min of the tripped starts, ${Math.round(100 * held)} % at held ones.`,
			figures: { swing, held },
			starts: context.bad.slice(-5),
			show: { signals: ['evapFlow', 'evapWaterIn'], from: -180, to: 300 }
		};
	}
};

export const plantStaging: SuspectRow = {
	key: 'plant-staging',
	family: 'plant',
	applies: always,
	clues: [
		otherMachine,
		flowSwings,
		{
			key: 'many-starts',
			direction: 'for',
			weight: 0.35,
			discriminates: true,
			needs: [],
			read: (context) => {
				const starts = context.starts;
				let most = 0;
				let busy: StartRecord[] = [];
				starts.forEach((start, i) => {
					const hour = starts
						.slice(i)
						.filter((one) => one.startedAt < start.startedAt + 3_600_000 && one.tryNumber === 1);
					if (hour.length > most) [most, busy] = [hour.length, hour];
				});
				const allowed = context.nature.startsPerHour ?? 4;
				return {
					strength: ramp(most, allowed - 0.5, allowed + 2),
					sentence: `${countWords(most, 'start')} within an hour${context.nature.startsPerHour ? `; the maker allows ${allowed}` : ''}.`,
					figures: { most, allowed },
					starts: busy.slice(-5)
				};
			}
		},
		figureClue({
			key: 'little-load-at-start',
			weight: 0.25,
			what: 'Leaving water at the tripped starts',
			quantity: 'temperature',
			figure: 'waterOutAtStart',
			needs: ['evapWaterOut', 'waterSetpoint'],
			of: (context) => context.bad,
			strength: (value, context) => {
				const setpoint = context.window('waterSetpoint', 0, 300, context.bad)?.value;
				return setpoint === undefined ? 0 : ramp(value - setpoint, 2, 0.5);
			}
		})
	],
	check: {
		key: 'plant-sequence',
		title: 'Trend of the plant’s sequence: stage delay, soft loading, minimum flow, bypass.',
		tools: ['plant sequence trend'],
		cautions: cautionsFor('freeze', 'protections'),
		unitOff: false
	}
};

const electrical = ['motor-temperature', 'starter-fault', 'phase-or-supply'] as const;

/** Spread of the phase currents over their mean, percent (NEMA MG 1 defines voltage unbalance the same way). */
function imbalance(context: Context, start: StartRecord): number | null {
	const ids = ['phaseCurrents', 'phaseCurrents.2', 'phaseCurrents.3'] as const;
	const currents = ids
		.map((id) =>
			context.reader.median(
				id,
				start.startedAt + 2000,
				Math.min(start.startedAt + 600_000, (start.endedAt ?? Infinity) - 500)
			)
		)
		.filter((value) => value !== null);
	const mean = currents.reduce((sum, value) => sum + value, 0) / currents.length;
	if (currents.length < 3 || !(mean > 0)) return null;
	return (100 * Math.max(...currents.map((value) => Math.abs(value - mean)))) / mean;
}

export const starterOrSupply: SuspectRow = {
	key: 'starter-or-supply',
	family: 'electrical',
	applies: always,
	clues: [
		{
			key: 'trips-within-seconds',
			direction: 'for',
			weight: 0.55,
			discriminates: true,
			needs: [],
			read: (context) => {
				const run = median(context.bad.map(runSeconds));
				if (run === null) return SILENT;
				// The true run lies up to one spacing either side: coarse logs cannot show 15 s.
				const spacing = median(context.bad.map((start) => start.spacingSeconds)) ?? 0;
				if (spacing > 15 && kindShare(context, ...electrical) === 0) return SILENT;
				return {
					strength: ramp(run, Math.max(25, 1.6 * spacing), Math.max(14, 1.05 * spacing)),
					sentence: `The trip comes ${context.words.seconds(run)} after the start, median of ${countWords(context.bad.length, 'trip')}.`,
					figures: { seconds: run },
					starts: context.bad.slice(-5),
					show: { signals: ['motorCurrent', 'condPressure', 'evapPressure'], from: 0, to: 30 }
				};
			}
		},
		{
			key: 'electrical-trips',
			direction: 'for',
			weight: 0.5,
			discriminates: true,
			needs: [],
			read: (context) => {
				const trips = tripsOfKind(context, ...electrical).filter((start) => start.trip?.basis === 'recorded');
				if (context.bad.length === 0) return SILENT;
				const quiet = context.window('systemDelta', 5, 120, trips);
				return {
					strength: ramp(trips.length / context.bad.length, 0.2, 0.6),
					sentence: `${countWords(trips.length, 'trip')} recorded by the motor's, starter's or supply's protection${quiet ? `, with ${context.words.pressureDifference(quiet.value)} of pressure difference built` : ''}.`,
					figures: { trips: trips.length },
					starts: trips.slice(-5)
				};
			}
		},
		{
			key: 'phases-unequal',
			direction: 'for',
			weight: 0.5,
			discriminates: true,
			needs: ['phaseCurrents'],
			read: (context) => {
				const spread = median(telling(context).map((start) => imbalance(context, start) ?? NaN));
				if (spread === null) return null;
				return {
					strength: ramp(spread, 4, 9),
					sentence: `Phase currents stand up to ${spread.toFixed(0)} % off their mean.`,
					figures: { imbalance: spread },
					starts: telling(context).slice(-5),
					show: { signals: ['phaseCurrents'], from: 0, to: 120 }
				};
			}
		},
		{
			key: 'no-pressure-response',
			direction: 'for',
			weight: 0.3,
			needs: ['evapSaturation'],
			read: (context) => {
				const moved = median(
					context.bad.map((start) => {
						const before = context.reader.last('evapSaturation', start.startedAt - 1, 120_000);
						const after = context.reader.last('evapSaturation', (start.endedAt ?? 0) - 1, 60_000);
						return before === null || after === null ? NaN : before - after;
					})
				);
				if (moved === null) return null;
				return {
					strength: ramp(moved, 2, 0.5),
					sentence: `Evaporator saturation had moved by only ${context.words.difference(moved)} when it tripped.`,
					figures: { moved },
					starts: context.bad.slice(-5)
				};
			}
		},
		{
			key: 'pressures-moved-normally',
			direction: 'against',
			weight: 0.6,
			needs: [],
			read: (context) => {
				const run = median(context.bad.map(runSeconds));
				if (run === null || kindShare(context, ...electrical) > 0.3) return SILENT;
				const spacing = median(context.bad.map((start) => start.spacingSeconds)) ?? 0;
				// Unequal phases are the supply's whatever the pressures did meanwhile.
				const unequal = median(context.bad.map((start) => imbalance(context, start) ?? NaN)) ?? 0;
				return {
					// A coarse log cannot show that it ran so long.
					strength: ramp(run - spacing, 30, 60) * ramp(unequal, 9, 4),
					sentence: `It ran for ${context.words.seconds(run)} before the trip: the motor was up and the pressures moved.`,
					figures: { seconds: run },
					starts: context.bad.slice(-5)
				};
			}
		}
	],
	check: {
		key: 'starter',
		title: 'Terminals, contactors, transition, phase monitor and supply, by a qualified person.',
		tools: ['meter', 'clamp meter', 'thermal camera', 'insulation tester'],
		cautions: cautionsFor('electrical', 'electricalStop', 'remoteStart'),
		unitOff: true
	}
};

/** How far evaporator saturation fell over the last spacing of a run, K; 0 where it rose or cannot be read. */
function fallAtStop(context: Context, start: StartRecord): number {
	const stop = start.endedAt ?? start.startedAt;
	const step = 1000 * start.spacingSeconds;
	const last = context.reader.last('evapSaturation', stop - 1, 2 * step);
	const before = context.reader.last('evapSaturation', stop - 1 - step, 2 * step);
	return last === null || before === null ? 0 : Math.max(0, before - last);
}

export const limitsOrSetup: SuspectRow = {
	key: 'limits-or-setup',
	family: 'plant',
	applies: always,
	clues: [
		{
			key: 'trips-outside-the-limit',
			direction: 'for',
			weight: 0.6,
			discriminates: true,
			needs: ['evapSaturation'],
			read: (context) => {
				const cutout = context.limit('evapSaturationCutout');
				// Only what the controller itself recorded: an inferred trip is told by the limit on record.
				const trips = tripsOfKind(context, 'low-evaporator-saturation', 'low-suction-pressure').filter(
					(start) => start.trip?.basis === 'recorded'
				);
				const least = median(trips.map((start) => start.figures.minEvapSaturation ?? NaN));
				if (cutout === null || least === null) return SILENT;
				// What the spacing can hide: one spacing and a half of the fall at the stop.
				const hidden = median(trips.map((start) => 1.5 * fallAtStop(context, start))) ?? 0;
				return {
					strength: ramp(least - cutout - Math.max(0, hidden), 1.2, 2.4) * ramp(trips.length, 1, 3),
					sentence: `Trips came with saturation no lower than ${context.words.temperature(least)}; the cut-out on record is ${context.words.temperature(cutout)}.`,
					figures: { least, cutout },
					starts: trips.slice(-5),
					show: { signals: ['evapSaturation'], from: 0, to: 300 }
				};
			}
		},
		{
			key: 'survives-lower-than-it-trips',
			direction: 'for',
			weight: 0.35,
			needs: ['evapSaturation'],
			read: (context) => {
				const trips = tripsOfKind(context, 'low-evaporator-saturation', 'low-suction-pressure');
				const tripped = median(trips.map((start) => start.figures.minEvapSaturation ?? NaN));
				const survived = context.held.map((start) => start.figures.minEvapSaturation ?? NaN).filter(Number.isFinite);
				if (tripped === null || survived.length === 0) return SILENT;
				const lowest = Math.min(...survived);
				return {
					strength: ramp(tripped - lowest, 1, 3),
					sentence: `A held start went down to ${context.words.temperature(lowest)}, lower than where it tripped (${context.words.temperature(tripped)}).`,
					figures: { survived: lowest, tripped },
					starts: context.held.filter((start) => start.figures.minEvapSaturation === lowest)
				};
			}
		}
	],
	check: {
		key: 'settings',
		title: 'Print the settings and compare them with the name-plate and the manual before touching anything.',
		tools: ['the unit’s manual', 'list of settings as found'],
		cautions: cautionsFor('protections', 'resets'),
		unitOff: false
	}
};
