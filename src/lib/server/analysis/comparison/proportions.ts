import { type Block, blockPermutation } from '../statistics/block-permutation';
import { fisherExact } from '../statistics/fisher-exact';
import { signFlip } from '../statistics/sign-flip';
import { wilson } from '../statistics/wilson';
import { siteClock } from '../wording/site-clock';
import { dependenceOf } from './day-outcomes';
import { type FirstTry, tally } from './first-tries';

export type Share = { k: number; m: number; low: number | null; high: number | null; d: number };

/** k of m with Wilson's 95 % interval of the effective counts k/d, m/d. */
export function shareOf(counted: readonly FirstTry[], timeZone: string): Share {
	const { k, m } = tally(counted);
	const { d } = dependenceOf(counted, timeZone);
	const interval = wilson(k / d, m / d);
	return { k, m, d, low: interval?.low ?? null, high: interval?.high ?? null };
}

export type SplitTest = {
	chance: number;
	method: 'sign-flip by day' | 'whole days shuffled' | 'whole weeks shuffled' | 'Fisher';
};

type DayCounts = Map<string, [{ k: number; m: number }, { k: number; m: number }]>;

function byBlock(groups: readonly (readonly FirstTry[])[], blockOf: (at: number) => string): DayCounts {
	const blocks: DayCounts = new Map();
	groups.forEach((counted, side) => {
		for (const one of counted) {
			const key = blockOf(one.start.startedAt);
			const counts = blocks.get(key) ?? [
				{ k: 0, m: 0 },
				{ k: 0, m: 0 }
			];
			const mine = counts[side === 0 ? 0 : 1];
			mine.m++;
			if (one.tripped) mine.k++;
			blocks.set(key, counts);
		}
	});
	return blocks;
}

const weekOf = (date: string) => String(Math.floor((Date.parse(date) / 86_400_000 + 3) / 7));

/** Both kinds on this many days or more: each day is its own comparison. */
const PAIRED_DAYS = 6;
/** From this correlation of neighbouring days on, whole weeks are kept together. */
const WEEKS_FROM = 0.3;

/**
 * How surprising the split of start-up trips between two groups is, were both alike. Six days or more with both kinds:
 * exact sign-flip of the daily differences. Else whole days (weeks when neighbouring days are alike) are shuffled; when
 * no day has more than one first try and days are not alike, Fisher's exact test says the same and is exact.
 * Method: method.md, "Comparing two groups of starts". Null when a group has no counted first try.
 */
export function splitTest(a: readonly FirstTry[], b: readonly FirstTry[], timeZone: string): SplitTest | null {
	if (a.length === 0 || b.length === 0) return null;
	const dateOf = (at: number) => siteClock(at, timeZone).date;
	const days = byBlock([a, b], dateOf);
	const paired = [...days.values()].filter(([first, second]) => first.m > 0 && second.m > 0);
	if (paired.length >= PAIRED_DAYS) {
		const flip = signFlip(paired.map(([first, second]) => first.k / first.m - second.k / second.m));
		if (flip) return { chance: flip.twoSided, method: 'sign-flip by day' };
	}
	const { rho } = dependenceOf([...a, ...b], timeZone);
	const crowded = [...days.values()].some(([first, second]) => first.m + second.m > 1);
	if (rho <= 0.05 && !crowded) {
		const [one, two] = [tally(a), tally(b)];
		return { chance: fisherExact(one.k, one.m - one.k, two.k, two.m - two.k).twoSided, method: 'Fisher' };
	}
	const weeks = rho > WEEKS_FROM;
	const blocks = weeks ? byBlock([a, b], (at) => weekOf(dateOf(at))) : days;
	const labelled: Block[] = [...blocks.values()].flatMap((counts) =>
		counts.flatMap((one, side) => (one.m === 0 ? [] : [{ group: side === 0 ? (0 as const) : (1 as const), ...one }]))
	);
	const chance = blockPermutation(labelled);
	return chance === null ? null : { chance, method: weeks ? 'whole weeks shuffled' : 'whole days shuffled' };
}
