import type { Interval } from '$lib/model/series';
import type { Circuit } from '../circuit';
import type { WatchedSignal } from '../first-mover/bands';
import { median, theilSen } from '../series/numbers';
import { readingsWithin } from '../series/window';

/** Off this long before a resting offset is read, s; slopes under 0.1 K/min (method.md, the night read as a test). */
export const OFFSET_AFTER = 1200;
const FLAT = 0.1;
/** The stretch an offset is read over, ms, at the end of what is usable [ours]. */
const STRETCH = 600_000;

/** Was water moving all through a stretch: by pump, proof or flow. null when none is logged. */
export function waterMoves(circuit: Circuit, side: 'evap' | 'cond', stretch: Interval): boolean | null {
	const signs: boolean[] = [];
	for (const id of [`${side}PumpRun`, `${side}FlowProof`] as const) {
		const series = circuit.map[id];
		const { v } = series === undefined ? { v: [] } : readingsWithin(series, stretch.from, stretch.to);
		if (v.length > 0) signs.push(Array.from(v).every((x) => x >= 0.5));
	}
	const flow = circuit.map[`${side}Flow`];
	if (flow !== undefined) {
		const design = side === 'evap' ? circuit.input.nature.designEvapFlow : circuit.input.nature.designCondFlow;
		const { v } = readingsWithin(flow, stretch.from, stretch.to);
		if (v.length > 0) signs.push(Array.from(v).every((x) => x > (design ? 0.2 * design : 0.5)));
	}
	return signs.length === 0 ? null : signs.some(Boolean) && signs.every(Boolean);
}

/** Median of a quantity over a stretch; null with no reading. */
export function restMedian(circuit: Circuit, id: WatchedSignal, stretch: Interval): number | null {
	const series = circuit.trace(id);
	return series === undefined ? null : median(readingsWithin(series, stretch.from, stretch.to).v);
}

/** Does a quantity stand still over a stretch: Theil–Sen slope under 0.1 K/min? null with fewer than two readings. */
export function isFlat(circuit: Circuit, id: WatchedSignal, stretch: Interval): boolean | null {
	const series = circuit.trace(id);
	if (series === undefined) return null;
	const readings = readingsWithin(series, stretch.from, stretch.to);
	const minutes = readings.t.map((t) => (t - stretch.from) / 60_000);
	const slope = theilSen(minutes, readings.v);
	return slope === null ? null : Math.abs(slope) < FLAT;
}

/**
 * The stretches a resting offset may be read over: ten minutes each, back from the rest's end, off for 20 min or more,
 * latest first.
 */
export function offsetStretches(rest: Interval): Interval[] {
	const stretches: Interval[] = [];
	for (let to = rest.to - 1; to - STRETCH >= rest.from + OFFSET_AFTER * 1000; to -= STRETCH) {
		stretches.push({ from: to - STRETCH, to });
	}
	return stretches;
}
