import { median } from '../series/numbers';
import { firstAtOrAfter } from '../series/search';
import type { Activation } from './activations';

/** A stop that an alarm may belong to. ms and seconds. */
export type Stop = { at: number; uncertainty: number };

/**
 * The alarm that belongs to each stop, or null. An alarm fits a stop when alarm time minus stop time lies between
 * −30 s and max(2 min, 2 × the alarm log's period); a stop is known only to its own spacing, which widens the early
 * side. One activation, one stop (the nearest); of several on one stop the nearest in time counts, and among those
 * within one period of it one whose kind is known.
 */
export function matchAlarms(stops: readonly Stop[], activations: readonly Activation[]): (Activation | null)[] {
	const perStop: Activation[][] = stops.map(() => []);
	const times = stops.map((stop) => stop.at);
	for (const activation of activations) {
		let best = -1;
		const near = firstAtOrAfter(times, activation.at);
		for (let i = Math.max(0, near - 3); i < Math.min(stops.length, near + 3); i++) {
			const stop = stops[i];
			if (stop === undefined || !fits(stop, activation)) continue;
			const distance = Math.abs(activation.at - stop.at);
			if (best < 0 || distance < Math.abs(activation.at - (times[best] ?? NaN))) best = i;
		}
		perStop[best]?.push(activation);
	}
	return perStop.map((found, i) => choose(found, times[i] ?? NaN));
}

function fits(stop: Stop, activation: Activation): boolean {
	const late = (activation.at - stop.at) / 1000;
	return late >= -30 - stop.uncertainty && late <= Math.max(120, 2 * activation.period);
}

function choose(found: readonly Activation[], stopAt: number): Activation | null {
	const byDistance = [...found].sort((a, b) => Math.abs(a.at - stopAt) - Math.abs(b.at - stopAt) || a.at - b.at);
	const nearest = byDistance[0];
	if (nearest === undefined) return null;
	const told = (a: Activation) => a.kind !== 'unknown' && a.kind !== 'other';
	if (told(nearest)) return nearest;
	const within = Math.max(nearest.period, 10) * 1000;
	return byDistance.find((a) => told(a) && Math.abs(a.at - nearest.at) <= within) ?? nearest;
}

const REACH = 7_200_000;

/**
 * The shift, seconds, to add to a history's clock so that most of its alarms meet a stop: within ±2 h, at least three,
 * more than at no shift, and most of the history. null when no shift is called for. A person confirms it.
 */
export function proposeShift(stops: readonly Stop[], activations: readonly Activation[]): number | null {
	const history = activations.filter((a) => a.source === 'history' && !a.power);
	if (history.length < 3 || stops.length < 3) return null;
	const matchedAsIs = history.filter((a) => stops.some((stop) => fits(stop, a))).length;
	const pairs: { shift: number; activation: number }[] = [];
	const times = stops.map((stop) => stop.at);
	history.forEach((activation, index) => {
		for (let i = firstAtOrAfter(times, activation.at - REACH); (times[i] ?? Infinity) <= activation.at + REACH; i++) {
			pairs.push({ shift: (times[i] ?? NaN) - activation.at, activation: index });
		}
	});
	pairs.sort((a, b) => a.shift - b.shift);
	const spread = 1000 * Math.max(30, median(stops.map((stop) => stop.uncertainty)) ?? 0);
	const best = widestCluster(pairs, spread);
	if (best.count < 3 || best.count < 0.6 * history.length || best.count < matchedAsIs + 2) return null;
	return Math.round((median(best.shifts) ?? 0) / 1000);
}

/** The window of the given width that holds most different activations. */
function widestCluster(pairs: readonly { shift: number; activation: number }[], width: number) {
	let best: { count: number; shifts: number[] } = { count: 0, shifts: [] };
	for (let first = 0; first < pairs.length; first++) {
		const inside = new Set<number>();
		const shifts: number[] = [];
		const from = pairs[first]?.shift ?? NaN;
		for (let i = first; i < pairs.length && (pairs[i]?.shift ?? Infinity) - from <= width; i++) {
			inside.add(pairs[i]?.activation ?? -1);
			shifts.push(pairs[i]?.shift ?? NaN);
		}
		// Regular restarts make several shifts fit alike: the clocks that are nearest together are the likelier.
		const nearer = inside.size === best.count && Math.abs(shifts[0] ?? 0) < Math.abs(best.shifts[0] ?? 0);
		if (inside.size > best.count || nearer) best = { count: inside.size, shifts };
	}
	return best;
}
