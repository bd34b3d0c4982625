import { seededRandom, shuffled } from './random';

/** What happened on one block (a day or a week): trips and first tries, and which group the block belongs to. */
export type Block = { group: 0 | 1; k: number; m: number };

function difference(blocks: readonly Block[], groups: readonly (0 | 1)[]): number | null {
	const k = [0, 0];
	const m = [0, 0];
	blocks.forEach((block, i) => {
		const group = groups[i] ?? 0;
		k[group] = (k[group] ?? 0) + block.k;
		m[group] = (m[group] ?? 0) + block.m;
	});
	const [k0 = 0, k1 = 0] = k;
	const [m0 = 0, m1 = 0] = m;
	return m0 === 0 || m1 === 0 ? null : k0 / m0 - k1 / m1;
}

/**
 * Permutation test of two proportions that keeps whole blocks together, because starts of one day (or week) share its
 * weather and people: the chance of a difference of rates as large or larger when group labels are shuffled over blocks.
 * The one seen counts as one draw. A group without a first try gives null.
 * Source: Good, Permutation, Parametric and Bootstrap Tests of Hypotheses (2005) ch. 3.
 */
export function blockPermutation(blocks: readonly Block[], draws = 9999, seed = 1): number | null {
	const labels = blocks.map((block) => block.group);
	const seen = difference(blocks, labels);
	if (seen === null) return null;
	const random = seededRandom(seed);
	let extreme = 1;
	for (let draw = 0; draw < draws; draw++) {
		const drawn = difference(blocks, shuffled(labels, random));
		if (drawn !== null && Math.abs(drawn) >= Math.abs(seen) - 1e-12) extreme++;
	}
	return extreme / (draws + 1);
}
