import type { Interval, Series } from '$lib/model/series';
import type { Stall } from '$lib/model/start';
import { valueInForce } from '../series/hold';
import { median, quantile, sampledQuantile } from '../series/numbers';
import { hasReadings, readingsWithin } from '../series/window';
import { limitingOver, namesLimit } from './limiting';
import type { FigureContext } from './sheet';
import { goodStretches, sliding, type Sliding } from './sliding';

/** Flat for 5 min; 5 points below demand; 2 °F above setpoint and dead band (method.md, stall). */
const FLAT_MS = 300_000;
const SHORT_OF_DEMAND = 5;
const WATER_ABOVE = 2 / 1.8;
/** A controller's dead band about its setpoint, K; not logged anywhere [ours]. */
const DEAD_BAND = 0.5;
/** Flat: under 2 points of drift over 5 min, readings within a standard deviation of one point of their mean [ours]. */
const DRIFT = 2;
const DEVIATION = 1;
/** Within this many points of its maximum the capacity is full [ours]. */
const FULL_BY = 3;
/** A hold in the first minutes that goes on loading by itself is a start-up ramp, not a stall [ours]. */
const RAMP_ENDS = 900_000;

/**
 * The stall of a start: capacity (or speed, % of its own most) flat for 5 min, at least 5 points below raw demand, or
 * with leaving water above setpoint + dead band + 2 °F, and short of its maximum; `limited` when a limit holds it,
 * `cannot-tell` when that is not known. The longest stretch counts, one that is a stall before any other.
 * `stage`: points between two stages of a stepped machine, which is short of demand only beyond one more.
 * @returns null when there is none, or neither demand nor setpoint is logged
 */
export function findStall(context: FigureContext, stage = 0): Stall | null {
	const load = loadPercent(context);
	if (load === null) return null;
	const from = context.startedAt + 180_000;
	const to = context.stopped ? context.stop - 30_000 : context.run.lastOn;
	const view = viewOf(context, load, stage);
	const full = (context.circuit.input.nature.maxCapacity ?? 100) - FULL_BY;
	const held = (a: number, b: number) => {
		const fit = view.load.fitWithin(a, b, 0.75);
		if (fit === null || fit.mean >= full || Math.abs(fit.slope) * 300 > DRIFT || fit.deviation > DEVIATION)
			return false;
		// Demand may be shown behind the limit: a log that names one says by itself that more was wanted.
		const stretch = { from: a, to: b };
		if (moreWanted(view, stretch, fit.mean)) return true;
		return namesLimit(context.circuit, stretch) && !(view.stepped && setpointMet(waterOver(view, stretch)));
	};
	// Two rows are no stretch: a coarse log must show the flat capacity three spacings long.
	const width = Math.max(FLAT_MS, 3000 * context.spacing);
	const stretches = goodStretches(from, to, width, 30_000, held).filter((s) => !isRamp(context, load, s));
	const stalls = stretches.map((stretch) => describe(context, load, stretch, waterOver(view, stretch)));
	const rank = (stall: Stall) => (stall.verdict === 'stall' ? 1e12 : 0) + (stall.to - stall.from);
	return stalls.reduce<Stall | null>((a, b) => (a !== null && rank(a) >= rank(b) ? a : b), null);
}

/** What the windows of a run are judged by. */
type View = {
	load: Sliding;
	demand: Sliding | null;
	water: Sliding | null;
	setpoint: Series | undefined;
	/** How far below raw demand is short of it, points: 5, and a stage more on a stepped machine. */
	short: number;
	stepped: boolean;
};

function viewOf(context: FigureContext, load: Series, stage: number): View {
	const { demand, evapWaterOut, waterSetpoint } = context.circuit.map;
	const ran = (series: Series) => sliding(readingsWithin(series, context.startedAt, context.run.lastOn));
	return {
		load: ran(load),
		demand: hasReadings(demand) ? ran(demand) : null,
		water: hasReadings(evapWaterOut) ? ran(evapWaterOut) : null,
		setpoint: waterSetpoint,
		short: SHORT_OF_DEMAND + stage,
		stepped: stage > 0
	};
}

/** Capacity, %; where only speed is logged, % of the most speed seen. */
function loadPercent(context: FigureContext): Series | null {
	const capacity = context.circuit.trace('capacity');
	if (capacity !== undefined) return capacity;
	const speed = context.circuit.trace('speed');
	const most = speed === undefined ? null : sampledQuantile(speed.v, 0.999);
	if (speed === undefined || most === null || most <= 0) return null;
	return { ...speed, v: speed.v.map((v) => (100 * v) / most) };
}

/**
 * Is more wanted over a stretch at `level` %? By raw demand 5 points above it, or by warm water where no demand is
 * logged or demand came down to the capacity (it had stood 10 points above while capacity never passed this level: it
 * follows the capacity, so it is not raw). A stepped machine whose water is at its setpoint stands where it should.
 */
function moreWanted(view: View, stretch: Interval, level: number): boolean {
	const demand = view.demand?.fitWithin(stretch.from, stretch.to, 0.5) ?? null;
	if (demand !== null) {
		if (demand.mean >= level + view.short) return !(view.stepped && setpointMet(waterOver(view, stretch)));
		// On a stepped machine demand stands between two stages by nature.
		if (view.stepped) return false;
		const before = view.demand?.mostBefore(stretch.from) ?? -Infinity;
		if (before < level + 10 || view.load.mostBefore(stretch.from) > level + 4) return false;
	}
	const water = waterOver(view, stretch);
	return water !== null && water > DEAD_BAND + WATER_ABOVE && !comingDown(view, stretch);
}

/** Water that still falls this fast is being cooled enough, K/min [ours]. */
const COMING_DOWN = 0.15;

function comingDown(view: View, stretch: Interval): boolean {
	const slope = view.water?.fitWithin(stretch.from, stretch.to, 0.5)?.slope ?? 0;
	return slope * 60 <= -COMING_DOWN;
}

/** Mean leaving water minus setpoint over a stretch, K; null where either is not logged. */
function waterOver(view: View, stretch: Interval): number | null {
	const water = view.water?.fitWithin(stretch.from, stretch.to, 0.5) ?? null;
	if (water === null || view.setpoint === undefined) return null;
	const setpoint = valueInForce('waterSetpoint', view.setpoint, stretch.to, 900);
	return Number.isNaN(setpoint) ? null : water.mean - setpoint;
}

/** Water within its dead band asks a stepped machine for no more, whatever a demand figure says. */
const setpointMet = (above: number | null) => above !== null && above <= DEAD_BAND;

function demandOver(context: FigureContext, stretch: Interval): number | null {
	const demand = context.circuit.map.demand;
	if (demand === undefined) return null;
	return median(readingsWithin(demand, stretch.from, stretch.to).v);
}

/** An early hold after which the capacity rose by 5 points or more within 10 min: a timed loading ramp. */
function isRamp(context: FigureContext, load: Series, stretch: Interval): boolean {
	if (stretch.to - context.startedAt > RAMP_ENDS) return false;
	const level = median(readingsWithin(load, stretch.from, stretch.to).v) ?? NaN;
	const after = readingsWithin(load, stretch.to, Math.min(stretch.to + 600_000, context.run.lastOn)).v;
	return (quantile(after, 0.9) ?? NaN) >= level + 5;
}

function describe(context: FigureContext, load: Series, stretch: Interval, water: number | null): Stall {
	const level = median(readingsWithin(load, stretch.from, stretch.to).v) ?? NaN;
	const demand = demandOver(context, stretch);
	const byWater = demand === null || demand < level + SHORT_OF_DEMAND;
	const limiting = limitingOver(context.circuit, stretch, level);
	if (!byWater && limiting.verdict === 'stall' && water !== null && water <= 0) {
		limiting.verdict = 'limited';
		limiting.limiting = 'met setpoint';
	}
	// With water alone the other circuit may be the one that is to load: only at its own maximum does this one count.
	const unknownSister = byWater && limiting.verdict === 'stall' && sisterHasRoom(context, stretch);
	const unknown = limiting.verdict === 'stall' && (unknownSister || cameDown(context, load, stretch, level));
	const verdict = unknown ? ('cannot-tell' as const) : limiting.verdict;
	return {
		from: stretch.from,
		to: stretch.to,
		levelPct: level,
		demandPct: demand,
		verdict,
		limiting: limiting.limiting
	};
}

/** A capacity that came down by this much to where it stands, while more was demanded, was taken down [ours]. */
const TAKEN_DOWN = 8;

/**
 * Did the capacity come down to its level in the quarter of an hour before, while demand stood above it? Then something
 * that is not logged holds it (an outside limit): a machine that stalls stops on its way up. Not in the first ten
 * minutes, where a slide may come down to its start position.
 */
function cameDown(context: FigureContext, load: Series, stretch: Interval, level: number): boolean {
	const from = Math.max(context.startedAt + 600_000, stretch.from - 900_000);
	const { demand } = context.circuit.map;
	if (demand === undefined || stretch.from - from < 120_000 || circuitNamesLimits(context)) return false;
	const before = quantile(readingsWithin(load, from, stretch.from).v, 0.9) ?? -Infinity;
	const wanted = median(readingsWithin(demand, stretch.from - 120_000, stretch.from).v) ?? -Infinity;
	return before >= level + TAKEN_DOWN && wanted >= level + SHORT_OF_DEMAND;
}

/** A log that names its limits would have named this one. */
function circuitNamesLimits(context: FigureContext): boolean {
	return context.circuit.input.texts.activeLimit !== undefined;
}

function sisterHasRoom(context: FigureContext, stretch: Interval): boolean {
	return context.circuit.input.others.some((other) => {
		if (!other.sameUnit || !(valueInForce('running', other.running, stretch.to, 900) >= 0.5)) return false;
		if (other.capacity === undefined) return true;
		return (median(readingsWithin(other.capacity, stretch.from, stretch.to).v) ?? 0) < 100 - FULL_BY;
	});
}
