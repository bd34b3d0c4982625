import type { FigureKey, StartRecord } from '$lib/model/start';
import { signFlip } from '../statistics/sign-flip';
import type { FirstTry } from './first-tries';

/** What starts are matched on, and how close two must be [ours]. */
const MATCH_ON: readonly { figure: FigureKey; within: number; label: string }[] = [
	{ figure: 'condWaterInAtStart', within: 1.5, label: 'condenser water' },
	{ figure: 'waterOutAtStart', within: 1.5, label: 'leaving water' },
	{ figure: 'outdoorAtStart', within: 3, label: 'outdoor temperature' }
];
const LEAST_PAIRS = 6;

export type Matched = {
	pairs: number;
	/** Trips of the matched first tries in each group. */
	a: number;
	b: number;
	/** Chance of a split this uneven within pairs, were both alike. */
	chance: number;
	matchedOn: string[];
};

type Covariate = (typeof MATCH_ON)[number];

function distance(a: StartRecord, b: StartRecord, on: readonly Covariate[]): number {
	let sum = 0;
	for (const { figure, within } of on) {
		const [x, y] = [a.figures[figure], b.figures[figure]];
		if (x === null || y === null || Math.abs(x - y) > within) return Infinity;
		sum += Math.abs(x - y) / within;
	}
	return a.firstStart === b.firstStart ? sum : sum + 0.5;
}

/**
 * Pairs of alike starts, one from each group, nearest first and each used once; then a sign-flip over the pairs.
 * @param definedBy figures the groups are defined by are not matched on
 * @returns null when fewer than six pairs are alike, or nothing to match on is logged
 */
export function matchedComparison(
	a: readonly FirstTry[],
	b: readonly FirstTry[],
	definedBy: ReadonlySet<FigureKey>
): Matched | null {
	const known = (list: readonly FirstTry[], figure: FigureKey) =>
		list.filter((one) => one.start.figures[figure] !== null).length >= 0.8 * list.length;
	const on = MATCH_ON.filter(({ figure }) => !definedBy.has(figure) && known(a, figure) && known(b, figure));
	if (on.length === 0) return null;
	const candidates = a
		.flatMap((one) => b.map((two) => ({ one, two, far: distance(one.start, two.start, on) })))
		.filter(({ far }) => far < Infinity)
		.sort((x, y) => x.far - y.far);
	const used = new Set<FirstTry>();
	const pairs: { one: FirstTry; two: FirstTry }[] = [];
	for (const { one, two } of candidates) {
		if (used.has(one) || used.has(two)) continue;
		used.add(one).add(two);
		pairs.push({ one, two });
	}
	if (pairs.length < LEAST_PAIRS) return null;
	const flip = signFlip(pairs.map(({ one, two }) => Number(one.tripped) - Number(two.tripped)));
	return {
		pairs: pairs.length,
		a: pairs.filter(({ one }) => one.tripped).length,
		b: pairs.filter(({ two }) => two.tripped).length,
		chance: flip?.twoSided ?? 1,
		matchedOn: on.map(({ label }) => label)
	};
}
