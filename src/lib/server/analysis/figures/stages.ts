import type { Circuit } from '../circuit';
import { readingsWithin } from '../series/window';

/** Levels this far apart are different stages, points. */
const APART = 4;
/** A machine with more levels than this is not stepped. */
const MOST_LEVELS = 8;
/** Levels held for this share of the running time between them make it stepped. */
const SHARE = 0.9;

/** A stepped machine whose levels cannot be read is taken for one of four stages, points. */
const USUAL_STAGE = 25;

/**
 * The capacity between two stages of a machine with stepped capacity, points. Zero for a machine that is not stepped: by
 * its nature, or where nature is silent by its readings, which are those of stages only when nine tenths of the running
 * time stand on even parts of 100 % (halves to eighths). A stepped machine stands between two stages by nature, so short
 * of demand by less than a stage is no stall.
 */
export function stageOf(circuit: Circuit): number {
	const control = circuit.input.nature.capacityControl;
	if (control !== undefined && control !== null && control !== 'steps') return 0;
	const levels = levelsOf(circuit);
	if (control === 'steps') {
		const apart = (levels ?? []).slice(1).map((level, i) => level - (levels?.[i] ?? 0));
		return apart.length > 0 ? Math.min(50, Math.max(...apart)) : USUAL_STAGE;
	}
	if (levels === null) return 0;
	for (let parts = 2; parts <= 8; parts++) {
		const stage = 100 / parts;
		if (levels.every((level) => Math.abs(level - stage * Math.round(level / stage)) <= 1.5)) return stage;
	}
	return 0;
}

/** Capacity levels that hold most of the running time, rising; null when they do not. */
function levelsOf(circuit: Circuit): number[] | null {
	const capacity = circuit.trace('capacity');
	if (capacity === undefined) return null;
	const counts = new Float64Array(160);
	let total = 0;
	for (const run of circuit.runs) {
		for (const v of readingsWithin(capacity, run.startedAt + 60_000, run.lastOn).v) {
			const bin = Math.round(v);
			if (bin <= 0 || bin >= counts.length) continue;
			counts[bin] = (counts[bin] ?? 0) + 1;
			total++;
		}
	}
	if (total < 100) return null;
	const near = (bin: number) => (counts[bin - 1] ?? 0) + (counts[bin] ?? 0) + (counts[bin + 1] ?? 0);
	const order = Array.from(counts.keys()).sort((a, b) => near(b) - near(a));
	const levels: number[] = [];
	let held = 0;
	for (const bin of order) {
		if (held >= SHARE * total) break;
		if (near(bin) < 0.005 * total || levels.length >= MOST_LEVELS) break;
		if (levels.some((level) => Math.abs(level - bin) < APART)) continue;
		levels.push(bin);
		held += near(bin);
	}
	return held >= SHARE * total && levels.length >= 2 ? levels.sort((a, b) => a - b) : null;
}
