import type { FieldCheckFact } from '$lib/model/checks';
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

/** Water difference over design at the load reached, of starts that run past 2 min (water lags before). */
function deltaRatio(context: Context): { value: number; designKnown: boolean; count: number } | null {
	const design = context.nature.designEvapDelta ?? null;
	const ratios: number[] = [];
	for (const start of context.starts) {
		const delta = context.window('evapDelta', 150, 3600, [start]);
		const load = context.window('capacity', 150, 3600, [start]);
		if (delta && load && load.value > 35) ratios.push(delta.value / ((design ?? RATED_DELTA) * (load.value / 100)));
	}
	const value = median(ratios);
	return value === null ? null : { value, designKnown: design !== null, count: ratios.length };
}

/** Flow over design, else over the unit's own usual (90th percentile of its starts). */
function flowShare(context: Context): { value: number; flow: number; count: number; from: string } | null {
	const bad = context.window('evapFlow', 10, 600, telling(context));
	if (!bad) return null;
	const design = context.nature.designEvapFlow ?? null;
	const own = quantile(context.window('evapFlow', 10, 600, context.starts)?.values ?? [], 0.9);
	const reference = design ?? own;
	if (!reference) return null;
	return {
		value: bad.value / reference,
		flow: bad.value,
		count: bad.starts.length,
		from: design ? 'design' : 'its own usual flow'
	};
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
			strength: ramp(share.value, 0.78, 0.6),
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
			strength: ramp(ratio.value, 1.3, 1.6) * (ratio.designKnown ? 1 : 0.6),
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
					strength: ramp(share.value, 0.82, 0.92) * (share.from === 'design' ? 1 : 0.6),
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
					strength: ramp(ratio.value, 1.15, 1) * (ratio.designKnown ? 1 : 0.6),
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
		{ key: 'plant-staging', share: 0.2 }
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

export const waterShortCircuit: SuspectRow = {
	key: 'water-short-circuit',
	family: 'water',
	applies: always,
	clues: [
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
	check: {
		key: 'bypass',
		title: 'Bypass, decoupler and check valves: where does the leaving water go?',
		tools: ['surface thermometer', 'piping drawing'],
		cautions: cautionsFor('freeze'),
		unitOff: false
	}
};
