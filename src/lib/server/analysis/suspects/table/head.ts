import type { StartRecord } from '$lib/model/start';
import { fisherExact } from '../../statistics/fisher-exact';
import { median } from '../../statistics/median';
import { countWords } from '../../wording/quantity-words';
import { cautionsFor } from '../cautions';
import { besideClue } from '../clue-builders';
import { always, type ClueRule, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { ramp } from '../strength';
import { differenceStops, oilPressureLost } from './shared';

/** What cools the condenser at the start: its water, else outdoor air. */
export function coolingAtStart(start: StartRecord): number | null {
	return start.figures.condWaterInAtStart ?? start.figures.outdoorAtStart;
}

/** Under this the condenser is cold for most machines: 65 °F (18.3 °C) where the unit's own least is not given [practice]. */
function coldBelow(context: Context): number {
	return context.limit('condWaterLeast') ?? (context.nature.condenser === 'air' ? 8 : 18.3);
}

const coolingOf = (starts: readonly StartRecord[]) =>
	starts.map((start) => coolingAtStart(start)).filter((value) => value !== null);

const tripsWhenCold: ClueRule = {
	key: 'trips-when-condenser-is-cold',
	direction: 'for',
	weight: 0.6,
	discriminates: true,
	needs: [['condWaterIn', 'outdoorTemp', 'condAirIn']],
	read: (context) => {
		const bad = median(coolingOf(context.bad));
		const held = median(coolingOf(context.held));
		if (bad === null) return null;
		const cold = ramp(bad, coldBelow(context) + 1.5, coldBelow(context) - 1.5);
		const apart = held === null ? 0.5 : ramp(bad - held, -0.7, -3);
		return {
			strength: cold * apart,
			sentence: `Condenser water entered at ${context.words.temperature(bad)} at the tripped starts${held === null ? '' : ` and at ${context.words.temperature(held)} at the held ones`}.`,
			figures: { tripped: bad, ...(held === null ? {} : { held }) },
			starts: context.bad.slice(-5),
			show: { signals: ['condWaterIn', 'condSaturation', 'lift'], from: -120, to: 300 }
		};
	}
};

/** Cold starts trip and warm ones hold, more than a shuffle would give. */
const clustersByCold: ClueRule = {
	key: 'trips-cluster-by-condenser-water',
	direction: 'for',
	weight: 0.25,
	needs: [['condWaterIn', 'outdoorTemp', 'condAirIn']],
	read: (context) => {
		const edge = coldBelow(context) + 1;
		const [a, b] = [coolingOf(context.bad), coolingOf(context.held)];
		const cold = { bad: a.filter((x) => x < edge).length, held: b.filter((x) => x < edge).length };
		if (a.length === 0 || b.length === 0) return SILENT;
		const chance = fisherExact(cold.bad, a.length - cold.bad, cold.held, b.length - cold.held).greater;
		return {
			strength: ramp(Math.log10(chance), -1, -2.5),
			sentence: `Under ${context.words.temperature(edge)} condenser water ${cold.bad} of ${countWords(cold.bad + cold.held, 'start')} tripped, above it ${a.length - cold.bad} of ${a.length + b.length - cold.bad - cold.held}.`,
			figures: { coldTripped: cold.bad, coldHeld: cold.held, warmTripped: a.length - cold.bad },
			starts: context.bad.slice(-5)
		};
	}
};

const tripsWhenWarm: ClueRule = {
	key: 'trips-with-warm-condenser-too',
	direction: 'against',
	weight: 0.8,
	needs: [['condWaterIn', 'outdoorTemp', 'condAirIn']],
	read: (context) => {
		const values = coolingOf(context.bad);
		if (values.length === 0) return null;
		const warm = values.filter((value) => value > coldBelow(context) + 2).length;
		return {
			strength: ramp(warm / values.length, 0.15, 0.5),
			sentence: `${warm} of ${countWords(values.length, 'trip')} came with condenser water over ${context.words.temperature(coldBelow(context) + 2)}.`,
			figures: { warm, trips: values.length },
			starts: context.bad.slice(-5)
		};
	}
};

const liftSmall = (weight: number): ClueRule =>
	besideClue({
		key: 'lift-small',
		weight,
		discriminates: true,
		what: 'Lift',
		quantity: 'temperatureDifference',
		trace: 'lift',
		window: [20, 75],
		size: [16, 10],
		shift: [-2, -6]
	});
const differenceLate = (weight: number, discriminates: boolean): ClueRule =>
	besideClue({
		key: 'pressure-difference-late',
		weight,
		discriminates,
		what: 'Pressure difference between condenser and evaporator',
		quantity: 'pressureDifference',
		trace: 'systemDelta',
		window: [20, 75],
		size: [200, 100],
		shift: [-40, -120]
	});

export const coldCondenserWater: SuspectRow = {
	key: 'cold-condenser-water',
	family: 'high-side',
	applies: always,
	clues: [
		tripsWhenCold,
		clustersByCold,
		liftSmall(0.3),
		differenceLate(0.15, false),
		tripsWhenWarm,
		{
			key: 'held-as-cold',
			direction: 'against',
			weight: 0.4,
			needs: [['condWaterIn', 'outdoorTemp', 'condAirIn']],
			read: (context) => {
				const bad = median(coolingOf(context.bad));
				const held = coolingOf(context.held);
				if (bad === null || held.length < 3) return SILENT;
				const cold = held.filter((value) => value <= bad + 0.5).length;
				return {
					strength: ramp(cold / held.length, 0.25, 0.5),
					sentence: `${cold} of ${countWords(held.length, 'held start')} began with condenser water as cold as the tripped ones.`,
					figures: { cold, held: held.length },
					starts: context.held.slice(-5)
				};
			}
		}
	],
	explainedBy: [{ key: 'refrigerant-migration', share: 0.4 }],
	trips: 'head',
	check: {
		key: 'condenser-water-control',
		title:
			'Entering condenser water at the start; bypass valve or fan control; one repeat with warm water by a competent person.',
		tools: ['reference thermometer', 'plant sequence trend'],
		cautions: cautionsFor('repeat', 'freeze', 'protections'),
		unitOff: false
	}
};

export const lowPressureDifference: SuspectRow = {
	key: 'low-pressure-difference',
	family: 'high-side',
	applies: always,
	clues: [
		{
			key: 'difference-trips-before-it-is-built',
			direction: 'for',
			weight: 0.7,
			discriminates: true,
			needs: ['systemDelta'],
			read: (context) => {
				const trips = differenceStops(context);
				const share = context.bad.length === 0 ? 0 : trips.length / context.bad.length;
				const last = median(
					trips.map((start) => context.reader.last('systemDelta', (start.endedAt ?? 0) - 500, 90_000) ?? NaN)
				);
				if (share === 0) return SILENT;
				if (last === null) return null;
				return {
					strength: ramp(share, 0.2, 0.6) * ramp(last, 220, 120),
					sentence: `${countWords(trips.length, 'oil or difference stop')} with only ${context.words.pressureDifference(last)} between condenser and evaporator.`,
					figures: { systemDelta: last, trips: trips.length },
					starts: trips.slice(-5),
					show: { signals: ['condPressure', 'evapPressure', 'oilPressure'], from: 0, to: 300 }
				};
			}
		},
		differenceLate(0.15, false),
		oilPressureLost('against', 0.5),
		{
			key: 'difference-is-no-protection-here',
			direction: 'against',
			weight: 0.5,
			needs: [],
			read: (context) => {
				if (context.bad.length === 0) return SILENT;
				const share = differenceStops(context).length / context.bad.length;
				return {
					strength: ramp(share, 0.2, 0),
					sentence: 'No oil or difference protection stopped it.',
					figures: { share },
					starts: []
				};
			}
		}
	],
	explainedBy: [{ key: 'starter-or-supply', share: 0.4 }],
	check: {
		key: 'difference-regulation',
		title:
			'Condenser-water regulating valve, bypass, fans and tower: how fast is the pressure difference built, against the manual?',
		tools: ['two gauges', 'watch', 'the unit’s manual'],
		cautions: cautionsFor('oilStop', 'protections', 'repeat'),
		unitOff: false
	}
};
