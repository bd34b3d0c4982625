import { finite } from './finite';
import { midRanks } from './mid-ranks';
import { normalCdf } from './normal';

export type MannWhitneyResult = {
	/** Pairs in which x is the larger, ties counted half. */
	u: number;
	twoSided: number;
	/** Chance of a U as large or larger (x tends to be larger). */
	greater: number;
	less: number;
	exact: boolean;
};

/** Beyond n₁ + n₂ of this the exact distribution costs too much for a page and a normal one with ties is used. */
export const EXACT_TOTAL = 80;

/**
 * Distribution of the doubled rank sum of `n` of the given doubled ranks, all choices equally likely.
 * @returns chance by doubled rank sum
 */
export function rankSumDistribution(doubledRanks: readonly number[], n: number): Float64Array {
	const most = doubledRanks.reduce((sum, rank) => sum + rank, 0);
	let table = Array.from({ length: n + 1 }, () => new Float64Array(most + 1));
	(table[0] ?? new Float64Array(1))[0] = 1;
	doubledRanks.forEach((rank, seen) => {
		// Chance form of Pascal's rule keeps every number in 0…1: of seen + 1 ranks, k are chosen.
		const next = Array.from({ length: n + 1 }, () => new Float64Array(most + 1));
		for (let k = 0; k <= Math.min(n, seen + 1); k++) {
			const row = next[k] ?? new Float64Array(0);
			const without = table[k];
			const withIt = table[k - 1];
			const share = k / (seen + 1);
			for (let sum = 0; sum <= most; sum++) {
				const kept = k <= seen ? (without?.[sum] ?? 0) * (1 - share) : 0;
				row[sum] = kept + (sum >= rank ? (withIt?.[sum - rank] ?? 0) * share : 0);
			}
		}
		table = next;
	});
	return table[n] ?? new Float64Array(0);
}

function exactTails(ranks: readonly number[], n1: number, doubledSum: number) {
	const chances = rankSumDistribution(
		ranks.map((rank) => Math.round(2 * rank)),
		n1
	);
	let less = 0;
	let greater = 0;
	chances.forEach((chance, sum) => {
		if (sum <= doubledSum) less += chance;
		if (sum >= doubledSum) greater += chance;
	});
	return { less: Math.min(1, less), greater: Math.min(1, greater) };
}

function normalTails(ranks: readonly number[], n1: number, n2: number, u: number) {
	const n = n1 + n2;
	const counts = new Map<number, number>();
	for (const rank of ranks) counts.set(rank, (counts.get(rank) ?? 0) + 1);
	let ties = 0;
	for (const count of counts.values()) ties += count ** 3 - count;
	const spread = Math.sqrt(((n1 * n2) / 12) * (n + 1 - ties / (n * (n - 1))));
	if (spread === 0) return { less: 1, greater: 1 };
	const off = u - (n1 * n2) / 2;
	return { less: normalCdf((off + 0.5) / spread), greater: 1 - normalCdf((off - 0.5) / spread) };
}

/**
 * Mann–Whitney test of two independent groups, exact with ties (the permutation distribution of the mid-rank sum)
 * up to n₁ + n₂ = 80, else normal with tie and continuity correction. Two-sided: twice the smaller tail, at most 1.
 * Readings that are not finite are left out; an empty group gives null.
 * Source: Mann & Whitney, Ann. Math. Stat. 18 (1947) 50; Lehmann, Nonparametrics (1975) ch. 1 for ties.
 */
export function mannWhitney(x: Iterable<number>, y: Iterable<number>): MannWhitneyResult | null {
	const first = finite(x);
	const second = finite(y);
	const [n1, n2] = [first.length, second.length];
	if (n1 === 0 || n2 === 0) return null;
	const ranks = midRanks([...first, ...second]);
	const sum = ranks.slice(0, n1).reduce((total, rank) => total + rank, 0);
	const u = sum - (n1 * (n1 + 1)) / 2;
	const exact = n1 + n2 <= EXACT_TOTAL;
	const tails = exact ? exactTails(ranks, n1, Math.round(2 * sum)) : normalTails(ranks, n1, n2, u);
	return { u, ...tails, twoSided: Math.min(1, 2 * Math.min(tails.less, tails.greater)), exact };
}
