import type { Stall, StartRecord } from '$lib/model/start';
import type { Series } from '$lib/model/series';
import type { Circuit } from '../circuit';
import { median, quantile } from '../series/numbers';
import { valueInForce } from '../series/hold';
import { extreme, readingsWithin } from '../series/window';

/** Three flat stretches at the same value but at different capacities show that this quantity held them [ours]. */
const LEAST = 3;
const OTHER_CAPACITY = 8;

/** A quantity that a controller holds the capacity by: where it stands while it holds, and how far it goes otherwise. */
type Held = {
	trace: 'motorCurrent' | 'condSaturation' | 'evapSaturation';
	name: string;
	/** 1: it tops out at the limit; −1: it bottoms out. */
	side: 1 | -1;
	/** Half the width within which it counts as the same value, and how far beyond it the runs may go. */
	same: (usual: number) => number;
	beyond: (usual: number) => number;
	/** How far it must move away from there in the runs: what never moves holds nothing. */
	moves: number;
	/** Seconds of each run left out: what a start does to it. */
	from: number;
};

const HELD: readonly Held[] = [
	{
		trace: 'motorCurrent',
		name: 'motor current',
		side: 1,
		same: (usual) => 0.02 * usual,
		beyond: (usual) => 0.05 * usual,
		moves: 0,
		from: 120
	},
	{
		trace: 'condSaturation',
		name: 'condensing',
		side: 1,
		same: () => 0.5,
		beyond: () => 0.8,
		moves: 1.5,
		from: 120
	},
	{
		trace: 'evapSaturation',
		name: 'evaporator saturation',
		side: -1,
		same: () => 0.4,
		beyond: () => 0.6,
		moves: 1,
		from: 600
	}
];

/**
 * Marks stalls as limited where the limit is not logged but shows: over three stretches or more the motor current, the
 * condensing or the evaporator saturation stood at one value (current within 2 %, saturations within half a kelvin)
 * while capacity differed by 8 points or more, and the runs never go past that value though they move away from it. A
 * sticking slide does the opposite: its capacity stands and these move with lift and load. Changes the starts in place.
 */
export function markPinnedQuantity(circuit: Circuit, starts: readonly StartRecord[]): void {
	for (const held of HELD) {
		const series = circuit.trace(held.trace);
		if (series !== undefined) markPinned(circuit, starts, held, series);
	}
}

function markPinned(circuit: Circuit, starts: readonly StartRecord[], held: Held, series: Series): void {
	// What another limit holds is told already.
	const byAnother = (stall: Stall) => stall.verdict === 'limited' && stall.limiting !== held.name;
	const stalls = starts.flatMap(({ stall }) => (stall === null || byAnother(stall) ? [] : [stall]));
	if (stalls.length < LEAST) return;
	const values = stalls.map((stall) => median(readingsWithin(series, stall.from, stall.to).v) ?? NaN);
	const usual = median(values) ?? NaN;
	const pinned = stalls.filter((_, i) => Math.abs((values[i] ?? NaN) - usual) <= held.same(usual));
	if (pinned.length < Math.max(LEAST, 0.6 * stalls.length)) return;
	const levels = pinned.map((stall) => stall.levelPct);
	if (Math.max(...levels) - Math.min(...levels) < OTHER_CAPACITY) return;
	if (!endsThere(circuit, held, series, usual)) return;
	if (held.trace === 'evapSaturation' && !apartFromWater(circuit, pinned)) return;
	for (const stall of pinned) {
		stall.verdict = 'limited';
		stall.limiting = held.name;
	}
}

/** Do the runs go no further than a value, though they move away from it? */
function endsThere(circuit: Circuit, held: Held, series: Series, usual: number): boolean {
	let furthest = -Infinity;
	let nearest = Infinity;
	for (const run of circuit.runs) {
		const readings = readingsWithin(series, Math.min(run.startedAt + held.from * 1000, run.lastOn), run.lastOn).v;
		const past = Float64Array.from(readings, (value) => held.side * (value - usual));
		furthest = Math.max(furthest, quantile(past, 0.98) ?? -Infinity);
		const away = extreme(readingsWithin(series, run.startedAt, run.lastOn), held.side);
		if (away !== null) nearest = Math.min(nearest, held.side * (away.value - usual));
	}
	return furthest <= held.beyond(usual) && -nearest >= held.moves;
}

/** With the water over its setpoint by this much, K, a saturation that stands is held by itself [ours]. */
const WATER_OVER = 0.8;

/**
 * Is the evaporator's saturation held by itself, not by the water? Water at its setpoint holds the saturation under it
 * as steady as a limit does.
 */
function apartFromWater(circuit: Circuit, stalls: readonly Stall[]): boolean {
	const { evapWaterOut, waterSetpoint } = circuit.map;
	if (evapWaterOut === undefined || waterSetpoint === undefined) return true;
	const over = stalls.map((stall) => {
		const water = median(readingsWithin(evapWaterOut, stall.from, stall.to).v) ?? NaN;
		return water - valueInForce('waterSetpoint', waterSetpoint, stall.to, 900);
	});
	return (median(over.filter((value) => !Number.isNaN(value))) ?? Infinity) >= WATER_OVER;
}
