import type { Interval, Series } from '$lib/model/series';
import type { Stall } from '$lib/model/start';
import { valueInForce } from '../series/hold';
import { median, quantile, sampledQuantile } from '../series/numbers';
import { firstAtOrAfter, lastAtOrBefore } from '../series/search';
import { readingsWithin } from '../series/window';
import { limitingOver } from './limiting';
import type { FigureContext } from './sheet';
import { goodStretches, sliding } from './sliding';

/** Flat for 5 min; 5 points below demand; 2 °F above setpoint and dead band (method.md, stall). */
const FLAT_MS = 300_000;
const SHORT_OF_DEMAND = 5;
const WATER_ABOVE = 2 / 1.8;
/** A controller's dead band about its setpoint, K; not logged anywhere [ours]. */
const DEAD_BAND = 0.5;
/** Flat: under 2 points of drift over 5 min, and nine tenths of the readings within 3 points [ours]. */
const DRIFT = 2;
const SPREAD = 3;
/** Within this many points of its maximum the capacity is full [ours]. */
const FULL_BY = 3;
/** A hold in the first minutes that goes on loading by itself is a start-up ramp, not a stall [ours]. */
const RAMP_ENDS = 900_000;

/**
 * The stall of a start: capacity (or speed, % of its own most) flat for 5 min, at least 5 points below raw demand, or
 * with leaving water above setpoint + dead band + 2 °F, and short of its maximum; `limited` when a limit holds it,
 * `cannot-tell` when that is not known. The longest stretch counts, one that is a stall before any other.
 * @returns null when there is none, or neither demand nor setpoint is logged
 */
export function findStall(context: FigureContext): Stall | null {
	const load = loadPercent(context);
	if (load === null) return null;
	const from = context.startedAt + 180_000;
	const to = context.stopped ? context.stop - 30_000 : context.run.lastOn;
	const readings = readingsWithin(load, from, to);
	if (readings.t.length < 2) return null;
	const width = Math.max(FLAT_MS, 2000 * context.spacing);
	const fits = sliding(readings);
	const full = (context.circuit.input.nature.maxCapacity ?? 100) - FULL_BY;
	const held = (a: number, b: number) => {
		const first = firstAtOrAfter(readings.t, a);
		const end = lastAtOrBefore(readings.t, b) + 1;
		if ((readings.t[end - 1] ?? NaN) - (readings.t[first] ?? NaN) < 0.75 * (b - a)) return false;
		const fit = fits.fit(first, end);
		if (fit === null || fit.mean >= full || Math.abs(fit.slope) * 300 > DRIFT) return false;
		const values = readings.v.subarray(first, end);
		if ((quantile(values, 0.95) ?? NaN) - (quantile(values, 0.05) ?? NaN) > SPREAD) return false;
		return wanting(context, { from: a, to: b }, fit.mean) !== null;
	};
	const stretches = goodStretches(from, to, width, 30_000, held).filter((s) => !isRamp(context, load, s));
	const stalls = stretches.map((stretch) => describe(context, load, stretch));
	const rank = (stall: Stall) => (stall.verdict === 'stall' ? 1e12 : 0) + (stall.to - stall.from);
	return stalls.reduce<Stall | null>((a, b) => (a !== null && rank(a) >= rank(b) ? a : b), null);
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
 * How more is wanted over a stretch at `level` %: by raw demand, or by warm water where no demand is logged or demand
 * came down to the capacity (it follows, so it is not raw). null when no more is wanted, or nothing tells.
 */
function wanting(context: FigureContext, stretch: Interval, level: number): 'demand' | 'water' | null {
	const demand = demandOver(context, stretch);
	if (demand !== null) {
		if (demand >= level + SHORT_OF_DEMAND) return 'demand';
		if (!demandFollowed(context, stretch, level)) return null;
	}
	const above = waterAbove(context, stretch);
	return above !== null && above > DEAD_BAND + WATER_ABOVE ? 'water' : null;
}

function demandOver(context: FigureContext, stretch: Interval): number | null {
	const demand = context.circuit.map.demand;
	if (demand === undefined) return null;
	return median(readingsWithin(demand, stretch.from, stretch.to).v);
}

/** Demand stood well above this level before, while capacity never got there: it came down to the capacity. */
function demandFollowed(context: FigureContext, stretch: Interval, level: number): boolean {
	const { demand, capacity } = context.circuit.map;
	if (demand === undefined || capacity === undefined) return false;
	const before = (series: Series) => quantile(readingsWithin(series, context.startedAt, stretch.from).v, 0.98);
	return (before(demand) ?? 0) >= level + 10 && (before(capacity) ?? Infinity) <= level + 3;
}

function waterAbove(context: FigureContext, stretch: Interval): number | null {
	const { evapWaterOut, waterSetpoint } = context.circuit.map;
	if (evapWaterOut === undefined || waterSetpoint === undefined) return null;
	const water = median(readingsWithin(evapWaterOut, stretch.from, stretch.to).v);
	const setpoint = valueInForce('waterSetpoint', waterSetpoint, stretch.to, 900);
	return water === null || Number.isNaN(setpoint) ? null : water - setpoint;
}

/** An early hold after which the capacity rose by 5 points or more within 10 min: a timed loading ramp. */
function isRamp(context: FigureContext, load: Series, stretch: Interval): boolean {
	if (stretch.to - context.startedAt > RAMP_ENDS) return false;
	const level = median(readingsWithin(load, stretch.from, stretch.to).v) ?? NaN;
	const after = readingsWithin(load, stretch.to, Math.min(stretch.to + 600_000, context.run.lastOn)).v;
	return (quantile(after, 0.9) ?? NaN) >= level + 5;
}

function describe(context: FigureContext, load: Series, stretch: Interval): Stall {
	const level = median(readingsWithin(load, stretch.from, stretch.to).v) ?? NaN;
	const demand = demandOver(context, stretch);
	const byWater = demand === null || demand < level + SHORT_OF_DEMAND;
	const limiting = limitingOver(context.circuit, stretch, level);
	// With water alone the other circuit may be the one that is to load: only at its own maximum does this one count.
	const unknownSister = byWater && limiting.verdict === 'stall' && sisterHasRoom(context, stretch);
	const verdict = unknownSister ? ('cannot-tell' as const) : limiting.verdict;
	return {
		from: stretch.from,
		to: stretch.to,
		levelPct: level,
		demandPct: demand,
		verdict,
		limiting: limiting.limiting
	};
}

function sisterHasRoom(context: FigureContext, stretch: Interval): boolean {
	return context.circuit.input.others.some((other) => {
		if (!other.sameUnit || !(valueInForce('running', other.running, stretch.to, 900) >= 0.5)) return false;
		if (other.capacity === undefined) return true;
		return (median(readingsWithin(other.capacity, stretch.from, stretch.to).v) ?? 0) < 100 - FULL_BY;
	});
}
