import type { Series } from '$lib/model/series';

/** A decoded block of one signal, with the place of its log in the order of upload. */
export type DecodedBlock = {
	/** Place of its log in the order of upload: later uploads have higher ones. Blocks of one log win in the order given. */
	ordinal: number;
	/** ms UTC, rising. */
	t: Float64Array;
	v: Float64Array;
	logging: 'interval' | 'change';
	increment: number | null;
	measure: string | null;
};

/** One signal's readings out of all its logs, and how many instants later uploads overrode with another value. */
export type Merged = { series: Series; conflicts: number };

/** Two readings closer than this are one figure written twice. */
const SAME = 1e-9;

function ordered(blocks: readonly DecodedBlock[]): DecodedBlock[] {
	return blocks.filter((b) => b.t.length > 0).sort((a, b) => (a.t[0] ?? 0) - (b.t[0] ?? 0) || a.ordinal - b.ordinal);
}

/** Do the blocks, in order of their first reading, follow each other without overlap? */
function apart(blocks: readonly DecodedBlock[]): boolean {
	for (let i = 1; i < blocks.length; i++) {
		const before = blocks[i - 1];
		if (before && (before.t[before.t.length - 1] ?? 0) >= (blocks[i]?.t[0] ?? 0)) return false;
	}
	return true;
}

function describe(blocks: readonly DecodedBlock[]): Pick<Series, 'logging' | 'increment' | 'measure'> {
	const last = blocks.reduce((a, b) => (b.ordinal >= a.ordinal ? b : a));
	const steps = blocks.map((b) => b.increment).filter((x): x is number => x !== null);
	return {
		// One block on an interval proves a clock; a hold rule for it would be wrong.
		logging: blocks.every((b) => b.logging === 'change') ? 'change' : 'interval',
		...(steps.length > 0 ? { increment: Math.max(...steps) } : {}),
		...(last.measure !== null ? { measure: last.measure } : {})
	};
}

function joined(blocks: readonly DecodedBlock[]): { t: Float64Array; v: Float64Array } {
	const only = blocks[0];
	if (blocks.length === 1 && only) return { t: only.t, v: only.v };
	const n = blocks.reduce((sum, b) => sum + b.t.length, 0);
	const t = new Float64Array(n);
	const v = new Float64Array(n);
	let at = 0;
	for (const block of blocks) {
		t.set(block.t, at);
		v.set(block.v, at);
		at += block.t.length;
	}
	return { t, v };
}

/** Readings of overlapping blocks by instant: the later upload wins, unless it has no reading there. */
function overlaid(blocks: readonly DecodedBlock[]): { t: Float64Array; v: Float64Array; conflicts: number } {
	const n = blocks.reduce((sum, b) => sum + b.t.length, 0);
	const t = new Float64Array(n);
	const v = new Float64Array(n);
	const rank = new Float64Array(n);
	let at = 0;
	// Ranks ascend, so a stable sort by time leaves the winner last among equals.
	for (const block of [...blocks].sort((a, b) => a.ordinal - b.ordinal)) {
		t.set(block.t, at);
		v.set(block.v, at);
		rank.fill(block.ordinal, at, at + block.t.length);
		at += block.t.length;
	}
	const order = Uint32Array.from({ length: n }, (_, i) => i).sort((a, b) => (t[a] ?? 0) - (t[b] ?? 0) || a - b);
	const outT = new Float64Array(n);
	const outV = new Float64Array(n);
	const outRank = new Float64Array(n);
	let conflicts = 0;
	let k = -1;
	let counted = false;
	for (const i of order) {
		const [time, value] = [t[i] ?? NaN, v[i] ?? NaN];
		if (k < 0 || outT[k] !== time) {
			k++;
			outT[k] = time;
			outV[k] = value;
			outRank[k] = rank[i] ?? 0;
			counted = false;
			continue;
		}
		if (Number.isNaN(value)) continue;
		const before = outV[k] ?? NaN;
		const differs = !Number.isNaN(before) && Math.abs(before - value) > SAME * Math.max(1, Math.abs(before));
		if (differs && !counted && outRank[k] !== rank[i]) {
			conflicts++;
			counted = true;
		}
		outV[k] = value;
		outRank[k] = rank[i] ?? 0;
	}
	return { t: outT.slice(0, k + 1), v: outV.slice(0, k + 1), conflicts };
}

/**
 * One series out of the blocks of several logs. By instant the later upload wins; where it has no reading the earlier
 * one stays. The logs' blocks may come in any order.
 * @throws TypeError without a block that holds a reading
 */
export function mergeBlocks(blocks: readonly DecodedBlock[]): Merged {
	const list = ordered(blocks);
	if (list.length === 0) throw new TypeError('there is nothing to merge');
	const { t, v, conflicts } = apart(list) ? { ...joined(list), conflicts: 0 } : overlaid(blocks);
	return { series: { t, v, ...describe(list) }, conflicts };
}
