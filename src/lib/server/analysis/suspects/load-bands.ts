import { median } from '../statistics/median';
import type { Context } from './context';

/** Capacity bands that are set against each other, %. */
const LOW = { from: 30, to: 60 };
const HIGH = { from: 72, to: 120 };
const STEP_SECONDS = 30;
const LEAST_READINGS = 4;
/** The latest starts are enough, and keep a season's log quick. */
const MOST_STARTS = 30;

export type Band = { superheat: number; valve: number | null; subcooling: number | null; readings: number };

/**
 * Superheat, valve and subcooling at light and at heavy load, read every 30 s over the first half hour of the latest
 * starts (the first minute left out). Null where a band has fewer than four readings of superheat.
 */
export function loadBands(context: Context): { low: Band; high: Band } | null {
	const found = { low: [[], [], []] as number[][], high: [[], [], []] as number[][] };
	for (const start of context.starts.slice(-MOST_STARTS)) {
		const end = Math.min(1800, ((start.endedAt ?? Infinity) - start.startedAt) / 1000);
		for (let at = 60; at < end; at += STEP_SECONDS) {
			const read = (trace: 'capacity' | 'superheat' | 'valvePosition' | 'subcooling') =>
				context.window(trace, at, Math.min(end, at + STEP_SECONDS), [start])?.value ?? NaN;
			const load = read('capacity');
			const band =
				load >= LOW.from && load < LOW.to ? found.low : load >= HIGH.from && load < HIGH.to ? found.high : null;
			if (!band) continue;
			[read('superheat'), read('valvePosition'), read('subcooling')].forEach((value, i) => band[i]?.push(value));
		}
	}
	const [low, high] = [bandOf(found.low), bandOf(found.high)];
	return low && high ? { low, high } : null;
}

function bandOf([superheats = [], valves = [], subcoolings = []]: number[][]): Band | null {
	const readings = superheats.filter(Number.isFinite).length;
	const superheat = median(superheats);
	if (superheat === null || readings < LEAST_READINGS) return null;
	return { superheat, valve: median(valves), subcooling: median(subcoolings), readings };
}
