import type { CircuitInput } from '$lib/model/circuit-input';
import type { SeriesId } from '$lib/model/signals';
import { DEFAULT_LIMITS, type UnitNature } from '$lib/model/unit';
import { analyseCircuit } from '../../analyse-circuit';
import { saturationPressure } from '../../refrigerants/saturation';
import { seededRandom } from '../../statistics/random';
import { inventedInput, inventedLog, MIDNIGHT, type InventedRun, type Shape } from '../../testing/synthetic-log';
import type { SuspectEvidence } from '../evidence';

/**
 * An invented week of a flooded twin screw: a morning and an afternoon run on each of eight days. Shapes are drawn by
 * hand, not simulated: enough to show one signature at a time. Invented data.
 */
export type Picture = {
	/** Does the run trip, and after how many seconds? null: it holds. */
	tripAfter: (day: number, morning: boolean) => number | null;
	startCapacity: number;
	stopCapacity: number;
	/** Where loading ends, %; `demand` stands at 100. */
	ceiling: number;
	/** Evaporator approach once settled, K. */
	approach: number;
	superheat: (sinceStart: number, trips: boolean) => number;
	dischargeSuperheat: (sinceStart: number, trips: boolean) => number;
	valve: (sinceStart: number, trips: boolean) => number;
	subcooling: number;
	margin: number;
	condWater: (morning: boolean) => number;
	condApproach: number;
	/** Added to the logged saturation, K. */
	sensorOffset: number;
	/** Share of design flow. */
	flow: number;
	/** Oil over the evaporator after a night, K. */
	oilLift: number;
	/** What the alarm history says of each trip. */
	tripText: string;
	/** Shapes put over the drawn ones, or beside them. */
	shapes: Partial<Record<SeriesId, Shape>>;
	/** Changes of the unit's nature and of the input, for suspects of other machines. */
	nature: Partial<UnitNature>;
	input: Partial<CircuitInput>;
};

export const SOUND: Picture = {
	tripAfter: () => null,
	startCapacity: 45,
	stopCapacity: 30,
	ceiling: 101,
	approach: 1.6,
	superheat: () => 2.5,
	dischargeSuperheat: (since) => Math.min(14, 6 + since / 20),
	valve: (since) => Math.min(58, 30 + since / 8),
	subcooling: 5,
	margin: 5,
	condWater: (morning) => (morning ? 23 : 25),
	condApproach: 1.8,
	sensorOffset: 0,
	flow: 1,
	oilLift: 22,
	tripText: 'low evaporator saturation trip',
	shapes: {},
	nature: {},
	input: {}
};

const NATURE: UnitNature = {
	evaporator: 'flooded',
	condenser: 'water',
	metering: 'electronic-valve',
	compressor: 'screw',
	capacityControl: 'slide',
	slideActuation: 'oil-both-ways',
	starter: 'wye-delta',
	starterTransition: 7,
	ratedAmps: 200,
	maxCapacity: 100,
	economiser: false,
	designEvapDelta: 5.5,
	designEvapFlow: 40
};
const DAY = 86_400;
const DAYS = 8;
const MORNING = 6 * 3600;
const AFTERNOON = 14 * 3600;
const RUN = 3 * 3600;
const CUT_OUT = 0.5;

type Run = InventedRun & { trips: boolean; morning: boolean };

function runsOf(picture: Picture): Run[] {
	const runs: Run[] = [];
	for (let day = 0; day < DAYS; day++)
		for (const morning of [true, false]) {
			const start = day * DAY + (morning ? MORNING : AFTERNOON);
			const trip = picture.tripAfter(day, morning);
			runs.push({ start, stop: start + (trip ?? RUN), trips: trip !== null, morning });
			// Somebody resets; the second try holds.
			if (trip !== null) runs.push({ start: start + 2400, stop: start + RUN, trips: false, morning });
		}
	return runs;
}

const NOISE: Partial<Record<SeriesId, number>> = { evapFlow: 0.3, valvePosition: 0.4, capacity: 0.4 };

/** Every signal of the week as a function of time; not one step of physics, only the signature. */
function drawnShapes(picture: Picture, runs: readonly Run[]): Partial<Record<SeriesId, Shape>> {
	const runAt = (t: number) => runs.find((run) => t >= run.start && t < run.stop);
	const lastStop = (t: number) => Math.max(-Infinity, ...runs.map((run) => run.stop).filter((stop) => stop <= t));
	const on = (since: number) => !Number.isNaN(since);
	const water: Shape = (t, since) => (on(since) ? 12 - 5 * (1 - Math.exp(-since / 400)) : 12.5);
	const evap: Shape = (t, since) => {
		const run = runAt(t);
		if (!run) return water(t, NaN) - 0.1;
		const settled = water(t, since) - picture.approach * (1 - Math.exp(-since / 40)) - 0.1;
		if (!run.trips) return settled - 3 * Math.exp(-(((since - 60) / 40) ** 2));
		// A trip is a dive to just under the logged cut-out at the trip instant.
		const length = run.stop - run.start;
		return settled - (settled + picture.sensorOffset - CUT_OUT + 0.6) * Math.min(1, since / (length - 6)) ** 2;
	};
	const condWater: Shape = (t) => picture.condWater(t % DAY < AFTERNOON - 3600);
	const cond: Shape = (t, since) =>
		on(since)
			? condWater(t, since) + (5 + picture.condApproach) * (1 - Math.exp(-since / 60))
			: condWater(t, since) + 0.2;
	const capacity: Shape = (t, since) => {
		const run = runAt(t);
		if (!run) return picture.stopCapacity;
		const loading = picture.startCapacity + Math.max(0, since - 120) / 6;
		return run.stop - t < 90 && !run.trips
			? Math.min(loading, picture.stopCapacity)
			: Math.min(picture.ceiling, loading);
	};
	const oil: Shape = (t, since) => {
		const rest = t - lastStop(t);
		const floor = evap(t, NaN) + picture.oilLift;
		return on(since)
			? cond(t, since) + picture.margin
			: floor + (cond(t, NaN) + picture.margin - floor) * Math.exp(-rest / 9000);
	};
	const trips = (t: number) => runAt(t)?.trips === true;
	return {
		capacity,
		demand: (_, since) => (on(since) ? 100 : 0),
		evapWaterOut: water,
		evapWaterIn: (t, since) =>
			water(t, since) +
			(on(since) ? ((5.5 * capacity(t, since)) / 100 / picture.flow) * (1 - Math.exp(-since / 60)) : 0),
		waterSetpoint: () => 6,
		evapFlow: () => 40 * picture.flow,
		evapPumpRun: () => 1,
		condPumpRun: (_, since) => (on(since) ? 1 : 0),
		evapSaturation: (t, since) => evap(t, since) + picture.sensorOffset,
		evapPressure: (t, since) => saturationPressure('R-134a', evap(t, since)) ?? NaN,
		condSaturation: cond,
		condPressure: (t, since) => saturationPressure('R-134a', cond(t, since)) ?? NaN,
		condWaterIn: condWater,
		condWaterOut: (t, since) => condWater(t, since) + (on(since) ? 5 * (1 - Math.exp(-since / 60)) : 0),
		motorCurrent: (t, since) => (on(since) ? 60 + 1.1 * capacity(t, since) : 0),
		suctionTemp: (t, since) => evap(t, since) + (on(since) ? picture.superheat(since, trips(t)) : 3),
		dischargeTemp: (t, since) => cond(t, since) + (on(since) ? picture.dischargeSuperheat(since, trips(t)) : 2),
		liquidTemp: (t, since) => cond(t, since) - (on(since) ? picture.subcooling : 0),
		oilTemp: oil,
		valvePosition: (t, since) => (on(since) ? picture.valve(since, trips(t)) : 0)
	};
}

/**
 * The evidence of an invented week, analysed. `without` leaves signals out of the log.
 * @param spacing seconds between rows
 */
export function inventedWeek(
	change: Partial<Picture>,
	{ spacing = 5, without = [], seed = 3 }: { spacing?: number; without?: readonly SeriesId[]; seed?: number } = {}
): SuspectEvidence {
	const picture = { ...SOUND, ...change };
	const runs = runsOf(picture);
	const random = seededRandom(seed);
	const noisy = Object.entries({ ...drawnShapes(picture, runs), ...picture.shapes })
		.filter(([id]) => !without.includes(id as SeriesId))
		.map(([id, shape]) => {
			const size = id.endsWith('Run') || id.startsWith('demand') ? 0 : (NOISE[id as SeriesId] ?? 0.08);
			return [id, (t: number, since: number) => shape(t, since) + size * (random() - 0.5)] as const;
		});
	const series = inventedLog(runs, spacing, 0, DAYS * DAY - 3600, Object.fromEntries(noisy));
	const input: CircuitInput = inventedInput(series, {
		nature: { ...NATURE, ...picture.nature },
		limits: {
			...DEFAULT_LIMITS,
			evapSaturationCutout: [{ value: CUT_OUT, provenance: 'given', validFrom: -Infinity }],
			condSaturationCutout: [{ value: 48, provenance: 'given', validFrom: -Infinity }]
		},
		events: runs
			.filter((run) => run.trips)
			.map((run) => ({
				at: MIDNIGHT + run.stop * 1000,
				text: picture.tripText,
				severity: 'trip' as const,
				what: 'activation' as const,
				source: 'history' as const
			})),
		...picture.input
	});
	return { input, starts: analyseCircuit(input).starts };
}
