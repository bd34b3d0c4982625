import type { FieldCheckFact } from '$lib/model/checks';
import type { StartRecord } from '$lib/model/start';
import { median } from '../../statistics/median';
import { quantile } from '../../statistics/quantile';
import { countWords } from '../../wording/quantity-words';
import { cautionsFor } from '../cautions';
import { checkClue, telling } from '../clue-builders';
import { always, type ClueRule, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { ramp } from '../strength';
import { kindShare, latestCheck, tripsOfKind } from './shared';

/** AHRI 550/590 (2015) rating conditions, 54 → 44 °F: the water difference of a unit whose design is not given. */
const RATED_DELTA = 5.56;

/** From this load on a plant with variable flow runs near its full flow, % [ours]. */
const FLOW_IS_FULL = 70;

/** Water difference over design at the load reached, of starts that run past 2 min (water lags before). */
function deltaRatio(context: Context): { value: number; sureness: number; designKnown: boolean; count: number } | null {
	const design = context.nature.designEvapDelta ?? null;
	const ratios: number[] = [];
	const loads: number[] = [];
	for (const start of context.starts) {
		const delta = context.window('evapDelta', 150, 3600, [start]);
		const load = context.window('capacity', 150, 3600, [start]);
		if (!delta || !load || load.value <= 35) continue;
		ratios.push(delta.value / ((design ?? RATED_DELTA) * (load.value / 100)));
		loads.push(load.value);
	}
	const value = median(ratios);
	// A plant with variable flow turns it down at part load on purpose: unless flow is logged, only full load tells.
	const told = context.reader.has('evapFlow') || (median(loads) ?? 0) >= FLOW_IS_FULL;
	const sureness = (design === null ? 0.6 : 1) * (told ? 1 : 0.5) * flowAllows(context);
	return value === null ? null : { value, sureness, designKnown: design !== null, count: ratios.length };
}

/** The most flow of a run that is no spike (its 95th percentile), the highest of the latest runs. */
function fullestFlow(context: Context): number {
	const runs = context.starts.slice(-20).map((start) => {
		const to = Math.min(start.endedAt ?? Infinity, start.startedAt + 12 * 3_600_000);
		return quantile(context.reader.values('evapFlow', start.startedAt + 60_000, to), 0.95) ?? 0;
	});
	return Math.max(0, ...runs);
}

/** Flow over design, else over the unit's own usual (90th percentile of its starts). */
function flowShare(
	context: Context
): { value: number; flow: number; count: number; from: string; byPlant: boolean } | null {
	const bad = context.window('evapFlow', 10, 600, telling(context));
	if (!bad) return null;
	const design = context.nature.designEvapFlow ?? null;
	const own = quantile(context.window('evapFlow', 10, 600, context.starts)?.values ?? [], 0.9);
	const reference = design ?? own;
	if (!reference) return null;
	const most = fullestFlow(context);
	const held = context.window('evapFlow', 10, 600, context.held);
	const asHeld = context.bad.length === 0 || (held !== null && held.value < bad.value + 0.1 * reference);
	return {
		// Flow that reaches design in other hours and is as low in starts that held is turned down by the plant.
		byPlant: most > 0.85 * reference && bad.value < 0.8 * reference && asHeld,
		value: bad.value / reference,
		flow: bad.value,
		count: bad.starts.length,
		from: design ? 'design' : 'its own usual flow'
	};
}

/** How far a logged flow leaves a wide water difference to low flow, 0…1: not when it is good, little when it is turned down. */
function flowAllows(context: Context): number {
	const flow = flowShare(context);
	if (!flow) return 1;
	return (flow.byPlant ? 0.3 : 1) * (flow.from === 'design' ? ramp(flow.value, 0.86, 0.72) : 1);
}

const flowLow: ClueRule = {
	key: 'flow-low',
	direction: 'for',
	weight: 0.7,
	discriminates: true,
	needs: ['evapFlow'],
	read: (context) => {
		const share = flowShare(context);
		if (!share) return null;
		return {
			strength: ramp(share.value, 0.78, 0.6) * (share.byPlant ? 0.3 : 1),
			sentence: `Evaporator flow ${context.words.flow(share.flow)}, ${Math.round(100 * share.value)} % of ${share.from}, median of ${countWords(share.count, 'start')}.`,
			figures: { flow: share.flow, share: share.value },
			starts: telling(context).slice(-5),
			show: { signals: ['evapFlow', 'evapDelta'], from: -120, to: 600 }
		};
	}
};

const deltaWide: ClueRule = {
	key: 'water-difference-wide',
	direction: 'for',
	weight: 0.6,
	discriminates: true,
	needs: ['evapDelta', 'capacity'],
	read: (context) => {
		const ratio = deltaRatio(context);
		if (!ratio) return null;
		return {
			// Over 1.3 times design at the load reached: common practice, no source.
			strength: ramp(ratio.value, 1.3, 1.6) * ratio.sureness,
			sentence: `Entering minus leaving water is ${ratio.value.toFixed(1)} times ${ratio.designKnown ? 'design' : 'a usual design'} at the load reached, median of ${countWords(ratio.count, 'start')}.`,
			figures: { ratio: ratio.value },
			starts: telling(context).slice(-5),
			show: { signals: ['evapWaterIn', 'evapWaterOut', 'capacity'], from: 0, to: 1200 }
		};
	}
};

/** The water itself goes cold and takes saturation with it; approach stays as in held starts. */
const waterFollows: ClueRule = {
	key: 'saturation-follows-water',
	direction: 'for',
	weight: 0.45,
	discriminates: true,
	needs: ['evapWaterOut', 'evapSaturation'],
	read: (context) => {
		const water = context.tripMinute('evapWaterOut', 60);
		const approach = context.tripMinute('evapApproach', 60);
		if (!water || !approach) return null;
		const setpoint = context.window('waterSetpoint', 0, 600, context.bad)?.value ?? 6.7;
		const cold = ramp(water.value, setpoint - 0.8, setpoint - 2.5);
		const usual = context.nature.evaporator === 'dx' ? 8 : 5;
		return {
			strength: cold * ramp(approach.value, usual + 3, usual),
			sentence: `Leaving water itself was down to ${context.words.temperature(water.value)} in the trip minute, with saturation ${context.words.difference(approach.value)} under it.`,
			figures: { waterOut: water.value, approach: approach.value },
			starts: water.starts,
			show: { signals: ['evapWaterOut', 'evapSaturation', 'evapWaterIn'], from: 0, to: 600 }
		};
	}
};

const flowCheck = (check: FieldCheckFact) =>
	check.kind === 'water-flow' && check.side === 'evaporator' ? check : null;
const flowMeasured = (direction: 'for' | 'against'): ClueRule =>
	checkClue(direction === 'for' ? 'flow-measured-low' : 'flow-measured-good', direction, (context) => {
		const check = latestCheck(context, flowCheck);
		const design = check?.design ?? context.nature.designEvapFlow ?? null;
		if (!check || design === null) return null;
		const share = check.flow / design;
		const strength = direction === 'for' ? ramp(share, 0.88, 0.75) : ramp(share, 0.85, 0.95);
		const sentence = `Flow measured at ${context.words.flow(check.flow)}, ${Math.round(100 * share)} % of design.`;
		return { at: check.at, half: check.indicative, strength, sentence };
	});

export const lowWaterFlow: SuspectRow = {
	key: 'low-water-flow',
	family: 'water',
	applies: always,
	clues: [
		flowLow,
		deltaWide,
		waterFollows,
		{
			key: 'flow-trips-with-flow-down',
			direction: 'for',
			weight: 0.3,
			needs: ['evapFlow'],
			read: (context) => {
				const share = kindShare(context, 'loss-of-water-flow', 'low-leaving-water');
				const flow = flowShare(context);
				if (!flow || share === 0) return SILENT;
				return {
					strength: share * ramp(flow.value, 0.85, 0.7),
					sentence: `Flow or leaving-water trips with flow at ${Math.round(100 * flow.value)} %.`,
					figures: { share: flow.value },
					starts: tripsOfKind(context, 'loss-of-water-flow', 'low-leaving-water').slice(-5)
				};
			}
		},
		{
			...flowLow,
			key: 'flow-good',
			direction: 'against',
			weight: 0.7,
			discriminates: false,
			read: (context) => {
				const share = flowShare(context);
				if (!share) return null;
				return {
					strength: ramp(share.value, 0.82, 0.92) * (share.from === 'design' ? 1 : 0.25),
					sentence: `Evaporator flow ${context.words.flow(share.flow)} is ${Math.round(100 * share.value)} % of ${share.from}.`,
					figures: { share: share.value },
					starts: telling(context).slice(-5)
				};
			}
		},
		{
			...deltaWide,
			key: 'water-difference-small',
			direction: 'against',
			weight: 0.4,
			discriminates: false,
			read: (context) => {
				const ratio = deltaRatio(context);
				if (!ratio) return null;
				return {
					strength: ramp(ratio.value, 1.15, 1) * ratio.sureness,
					sentence: `Entering minus leaving water is ${ratio.value.toFixed(1)} times ${ratio.designKnown ? 'design' : 'a usual design'} at the load reached.`,
					figures: { ratio: ratio.value },
					starts: telling(context).slice(-5)
				};
			}
		},
		flowMeasured('for'),
		flowMeasured('against')
	],
	showsWithoutSymptom: true,
	explainedBy: [
		{ key: 'evap-saturation-sensor', share: 0.4 },
		{ key: 'plant-staging', share: 0.5 }
	],
	check: {
		key: 'shell-pressure-drop',
		title: 'Pressure drop over the evaporator against its flow curve; strainer, air, flow proof, pump lead time.',
		tools: ['differential gauge', 'the evaporator’s flow curve', 'strainer key'],
		cautions: cautionsFor('freeze', 'protections', 'remoteStart'),
		unitOff: false
	}
};

/** Flow-loss trips although nothing in the water moved. */
export const flowProving: SuspectRow = {
	key: 'flow-proving',
	family: 'water',
	applies: always,
	clues: [
		{
			key: 'flow-trip-with-steady-water',
			direction: 'for',
			weight: 0.6,
			discriminates: true,
			needs: ['evapWaterOut'],
			read: (context) => {
				const trips = tripsOfKind(context, 'loss-of-water-flow');
				const steady = trips.filter((start) => waterSteady(context, start.startedAt, start.endedAt ?? start.startedAt));
				if (trips.length === 0) return SILENT;
				return {
					strength: (steady.length / trips.length) * ramp(trips.length / context.bad.length, 0.2, 0.6),
					sentence: `${steady.length} of ${countWords(trips.length, 'flow trip')} came with flow or water temperatures steady.`,
					figures: { steady: steady.length, trips: trips.length },
					starts: steady.slice(-5),
					show: { signals: ['evapFlow', 'evapFlowProof', 'evapWaterIn', 'evapWaterOut'], from: 0, to: 300 }
				};
			}
		},
		{
			key: 'proof-chatters',
			direction: 'for',
			weight: 0.4,
			discriminates: true,
			needs: ['evapFlowProof', 'evapPumpRun'],
			read: (context) => {
				const chatter = context.starts.filter((start) => {
					const from = start.startedAt;
					const to = start.endedAt ?? from + 3_600_000;
					const pump = context.reader.values('evapPumpRun', from, to - 1000);
					const proof = context.reader.values('evapFlowProof', from, to + 1000 * Math.min(30, start.spacingSeconds));
					const drops = proof.filter((value, i) => value === 0 && proof[i - 1] === 1).length;
					return drops >= 1 && pump.every((value) => value === 1);
				});
				return {
					strength: ramp(chatter.length / Math.max(1, context.starts.length), 0.05, 0.3),
					sentence: `The flow proof dropped with the pump on in ${countWords(chatter.length, 'start')}.`,
					figures: { starts: chatter.length },
					starts: chatter.slice(-5)
				};
			}
		}
	],
	check: {
		key: 'flow-switch',
		title:
			'At the switch: contact, paddle or pressure difference, with the pump running; pump lead time against the manual.',
		tools: ['meter', 'differential gauge', 'the unit’s manual'],
		cautions: cautionsFor('protections', 'freeze', 'electrical'),
		unitOff: true
	}
};

function waterSteady(context: Context, from: number, to: number): boolean {
	const flow = context.reader.values('evapFlow', from, to - 500);
	if (flow.length >= 2) return (flow.at(-1) ?? 0) > 0.85 * Math.max(...flow);
	const before = context.reader.median('evapDelta', to - 180_000, to - 60_000);
	const after = context.reader.median('evapDelta', to - 45_000, to);
	return before !== null && after !== null && Math.abs(after - before) < 0.8;
}

/** Water lags the start by up to a minute; after five a run cut short has shown what it does. */
const TURNS_FROM = 45;
const TURNS_TO = 300;

/**
 * Minutes in which a run cools all the water that circulates once: its water difference over the rate at which the
 * entering water falls. Infinite where the entering water does not fall; null where the run is too short to tell.
 */
function turnover(context: Context, start: StartRecord): number | null {
	const to = Math.min(TURNS_TO, ((start.endedAt ?? Infinity) - start.startedAt) / 1000 - 1);
	const wide = Math.max(15, start.spacingSeconds);
	const seconds = to - TURNS_FROM - wide;
	if (seconds < Math.max(45, start.spacingSeconds)) return null;
	const first = context.window('evapWaterIn', TURNS_FROM, TURNS_FROM + wide, [start]);
	const last = context.window('evapWaterIn', to - wide, to, [start]);
	const delta = context.window('evapDelta', TURNS_FROM, to, [start]);
	if (!first || !last || !delta || delta.value < 0.3) return null;
	const rate = (first.value - last.value) / (seconds / 60);
	return rate < 0.1 ? Infinity : delta.value / rate;
}

/** Runs that ended by themselves within a quarter of an hour. */
const shortRuns = (context: Context): StartRecord[] =>
	context.starts.filter(
		(start) => start.outcome !== 'tripped' && start.endedAt !== null && start.endedAt - start.startedAt < 900_000
	);

/**
 * The same little water comes round again and again. A loop holds 3 to 10 gallons a ton, 1.5 to 4 minutes of the design
 * flow: common practice, no source. Less is not the building's water.
 */
const waterComesRound: ClueRule = {
	key: 'entering-falls-with-leaving',
	direction: 'for',
	weight: 0.6,
	discriminates: true,
	needs: ['evapDelta'],
	read: (context) => {
		const turns = context.gather(context.starts, (start) => turnover(context, start));
		if (!turns) return null;
		const short = shortRuns(context);
		return {
			strength: ramp(turns.value, 2, 1.2) * ramp(short.length / context.starts.length, 0.3, 0.6),
			sentence: `Entering water follows leaving water down: all the water that circulates is cooled once in ${context.words.seconds(60 * turns.value)}, and ${short.length} of ${countWords(context.starts.length, 'run')} ended within a quarter of an hour.`,
			figures: { turnoverMinutes: turns.value, short: short.length, runs: context.starts.length },
			starts: turns.starts.slice(-5),
			show: { signals: ['evapWaterIn', 'evapWaterOut', 'capacity'], from: -120, to: 900 }
		};
	}
};

const manyShortRuns: ClueRule = {
	key: 'many-short-runs',
	direction: 'for',
	weight: 0.2,
	needs: [],
	read: (context) => {
		const short = shortRuns(context);
		const [first, last] = [context.starts[0], context.starts.at(-1)];
		if (!first || !last || short.length < 3) return SILENT;
		const days = Math.max(1, (last.startedAt - first.startedAt) / 86_400_000);
		return {
			strength: ramp(short.length / days, 4, 10),
			sentence: `${countWords(short.length, 'run')} of under a quarter of an hour in ${Math.round(days)} days.`,
			figures: { short: short.length, days },
			starts: short.slice(-5)
		};
	}
};

export const waterShortCircuit: SuspectRow = {
	key: 'water-short-circuit',
	family: 'water',
	applies: always,
	clues: [
		waterComesRound,
		manyShortRuns,
		{
			key: 'entering-follows-leaving',
			direction: 'for',
			weight: 0.6,
			discriminates: true,
			needs: ['evapDelta', 'capacity'],
			read: (context) => {
				const delta = context.window('evapDelta', 240, 900, context.starts);
				const load = context.window('capacity', 240, 900, context.starts);
				if (!delta || !load) return null;
				const before = median(context.starts.map((start) => start.figures.waterOutAtStart ?? NaN));
				const later = context.window('evapWaterIn', 240, 900, context.starts);
				const fell = before === null || !later ? 0 : before - later.value;
				return {
					strength: ramp(delta.value, 1.6, 0.8) * ramp(load.value, 30, 45) * ramp(fell, 1, 3),
					sentence: `Entering water comes down to within ${context.words.difference(delta.value)} of leaving soon after the start, at ${context.words.percent(load.value)} capacity.`,
					figures: { evapDelta: delta.value, capacity: load.value },
					starts: delta.starts.slice(-5),
					show: { signals: ['evapWaterIn', 'evapWaterOut', 'capacity'], from: 0, to: 900 }
				};
			}
		}
	],
	showsWithoutSymptom: true,
	check: {
		key: 'bypass',
		title: 'Bypass, decoupler and check valves: where does the leaving water go?',
		tools: ['surface thermometer', 'piping drawing'],
		cautions: cautionsFor('freeze'),
		unitOff: false
	}
};
