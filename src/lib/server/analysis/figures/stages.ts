import type { Circuit } from '../circuit';
import { readingsWithin } from '../series/window';

/** Levels this far apart are different stages, points. */
const APART = 4;
/** A machine with more levels than this is not stepped. */
const MOST_LEVELS = 8;
/** Levels held for this share of the running time between them make it stepped. */
const SHARE = 0.9;

/** No more than this share may stand elsewhere. */
const STRAYS = 0.005;

/** A stepped machine whose levels cannot be read is taken for one of four stages, points. */
const USUAL_STAGE = 25;

/**
 * The capacity between two stages of a machine with stepped capacity, points. Zero for a machine that is not stepped: by
 * its nature, or where nature is silent by its readings, which are those of stages only when all of the running time
 * stands on even parts of 100 %. A stepped machine stands between two stages by nature, so short
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
	return levels === null ? 0 : evenStage(circuit);
}

/** Parts of full capacity that machines are stepped in. */
const PARTS = [2, 3, 4, 5, 6, 8] as const;

/**
 * The stage of a machine whose capacity never stands anywhere but on even parts of 100 % (halves to eighths), loading
 * included: what slides on its way up is not stepped. Readings caught between two stages do not stand. 0 when it is not.
 */
function evenStage(circuit: Circuit): number {
	const capacity = circuit.trace('capacity');
	if (capacity === undefined) return 0;
	const off = new Map<number, number>(PARTS.map((parts) => [parts, 0]));
	let total = 0;
	for (const run of circuit.runs) {
		const values = readingsWithin(capacity, run.startedAt, run.lastOn).v;
		for (let i = 1; i + 1 < values.length; i++) {
			const value = values[i] ?? NaN;
			const stands = Math.abs(value - (values[i - 1] ?? NaN)) <= 1 && Math.abs(value - (values[i + 1] ?? NaN)) <= 1;
			if (!stands) continue;
			total++;
			for (const parts of PARTS) {
				const stage = 100 / parts;
				if (Math.abs(value - stage * Math.round(value / stage)) > 1.2) off.set(parts, (off.get(parts) ?? 0) + 1);
			}
		}
	}
	const found = PARTS.find((parts) => (off.get(parts) ?? total) <= STRAYS * total);
	return found === undefined || total === 0 ? 0 : 100 / found;
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
	return held >= SHARE * total && levels.length >= 1 ? levels.sort((a, b) => a - b) : null;
}
