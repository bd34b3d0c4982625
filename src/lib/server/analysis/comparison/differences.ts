import type { Quantity } from '$lib/model/quantities';
import { type FigureKey, FIGURES, type StartRecord } from '$lib/model/start';
import { FIGURE_WORDS } from '$lib/model/words';
import { benjaminiHochberg } from '../statistics/benjamini-hochberg';
import { hodgesLehmann } from '../statistics/hodges-lehmann';
import { mannWhitney } from '../statistics/mann-whitney';
import { median } from '../statistics/median';

/**
 * At most eight pre-trip discriminators are tested as one family: what a start that trips has as well as one that
 * holds, and what people can act on. Everything else is exploratory.
 */
export const DISCRIMINATORS: readonly FigureKey[] = [
	'startCapacity',
	'startAmps',
	'condWaterInAtStart',
	'waterOutAtStart',
	'oilTempAtStart',
	'oilLiftAtStart',
	'liftAtStart',
	'systemDeltaAt30s'
];
/** What a trip is made of is described, never tested between tripped and held starts. */
const DEFINES_TRIP: readonly FigureKey[] = [
	'minEvapSaturation',
	'minEvapSaturationAtSeconds',
	'steepestFall',
	'secondsBelowCutout',
	'degreeSecondsBelowCutout'
];
/** Figures that only a run past the start-up window has: compared only when both groups are such runs. */
const SETTLED: readonly FigureKey[] = [
	'evapApproach',
	'condApproach',
	'superheat',
	'settledDischargeSuperheat',
	'settledSubcooling',
	'settledMargin',
	'settledOilTemp',
	'settledLift',
	'evapDelta',
	'flow',
	'peakCapacity',
	'timeToPeakSeconds',
	'maxOilTemp',
	'pullDownRate',
	'meanValvePosition',
	'powerPerDuty'
];

export type Role = 'tested' | 'exploratory' | 'too-few' | 'described';
export type Difference = {
	key: FigureKey;
	label: string;
	quantity: Quantity;
	/** Quantity of the shift: a difference where the value is a temperature or pressure. */
	shiftQuantity: Quantity;
	a: number | null;
	b: number | null;
	countA: number;
	countB: number;
	/** A minus B. */
	shift: number | null;
	low: number | null;
	high: number | null;
	coverage: number | null;
	superiority: number | null;
	role: Role;
	/** Chance of a split this far apart were both alike, after the family's correction where it belongs to it. */
	chance: number | null;
	clear: boolean;
	words: string;
};

const shiftOf = (quantity: Quantity): Quantity =>
	quantity === 'temperature' ? 'temperatureDifference' : quantity === 'pressure' ? 'pressureDifference' : quantity;

/** The strongest result that group sizes allow: 2/C(n₁ + n₂, n₁). */
export function strongestPossible(n1: number, n2: number): number {
	let ways = 1;
	for (let i = 1; i <= n1; i++) ways *= (n2 + i) / i;
	return Math.min(1, 2 / ways);
}

function wordsOf(superiority: number, clear: boolean): string {
	if (!clear) return 'no clear difference';
	const above = superiority > 0.5;
	const strength = Math.max(superiority, 1 - superiority);
	return `${strength === 1 ? 'always' : strength >= 0.85 ? 'nearly always' : 'mostly'} ${above ? 'higher' : 'lower'}`;
}

function roleOf(key: FigureKey, definedBy: ReadonlySet<FigureKey>, outcomeSplit: boolean, few: boolean): Role {
	if (definedBy.has(key) || (outcomeSplit && DEFINES_TRIP.includes(key))) return 'described';
	if (few) return 'too-few';
	return DISCRIMINATORS.includes(key) ? 'tested' : 'exploratory';
}

function rowOf(
	key: FigureKey,
	a: readonly StartRecord[],
	b: readonly StartRecord[],
	role: (few: boolean) => Role
): Difference | null {
	const values = (starts: readonly StartRecord[]) =>
		starts.map((start) => start.figures[key]).filter((v) => v !== null);
	const [x, y] = [values(a), values(b)];
	if (x.length === 0 && y.length === 0) return null;
	const test = mannWhitney(x, y);
	const shift = hodgesLehmann(x, y);
	const few = test === null || strongestPossible(x.length, y.length) > 0.05;
	const quantity = FIGURES[key];
	return {
		key,
		label: FIGURE_WORDS[key],
		quantity,
		shiftQuantity: shiftOf(quantity),
		a: median(x),
		b: median(y),
		countA: x.length,
		countB: y.length,
		shift: shift?.shift ?? null,
		low: shift?.interval?.low ?? null,
		high: shift?.interval?.high ?? null,
		coverage: shift?.interval?.coverage ?? null,
		superiority: test ? test.u / (x.length * y.length) : null,
		role: role(few),
		chance: few ? null : test.twoSided,
		clear: false,
		words: few ? 'too few to tell' : ''
	};
}

/** Is a start-up trip in one group and none in the other, so that figures of runs cannot be set side by side? */
function mixesTrips(a: readonly StartRecord[], b: readonly StartRecord[]): boolean {
	return a.some((start) => start.startupTrip) || b.some((start) => start.startupTrip);
}

/**
 * The table of differences between two groups: medians, Hodges–Lehmann shift with its interval, superiority, and the
 * role of each figure. The tested ones (eight at most) are corrected as one family after Benjamini and Hochberg at 5 %;
 * the clearest come first.
 * @param definedBy figures that the groups are defined by: described only
 */
export function differencesOf(
	a: readonly StartRecord[],
	b: readonly StartRecord[],
	definedBy: ReadonlySet<FigureKey>
): Difference[] {
	const outcomeSplit = a.every((start) => start.startupTrip) !== b.every((start) => start.startupTrip);
	const keys = [...DISCRIMINATORS, ...DEFINES_TRIP, ...(mixesTrips(a, b) ? [] : SETTLED)];
	const rows = keys
		.map((key) => rowOf(key, a, b, (few) => roleOf(key, definedBy, outcomeSplit, few)))
		.filter((row) => row !== null);
	const tested = rows.filter((row) => row.role === 'tested' && row.chance !== null);
	const adjusted = benjaminiHochberg(tested.map((row) => row.chance ?? 1));
	tested.forEach((row, i) => (row.chance = adjusted[i] ?? 1));
	for (const row of rows) {
		if (row.role === 'described') row.words = 'described: it belongs to what divides the groups';
		if (row.role !== 'tested' && row.role !== 'exploratory') continue;
		row.clear = row.chance !== null && row.chance <= 0.05;
		row.words = wordsOf(row.superiority ?? 0.5, row.clear);
	}
	const order: readonly Role[] = ['tested', 'exploratory', 'too-few', 'described'];
	return rows.sort(
		(one, two) => order.indexOf(one.role) - order.indexOf(two.role) || (one.chance ?? 1) - (two.chance ?? 1)
	);
}
