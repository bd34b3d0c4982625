import { SUSPECT_WORDS } from '$lib/model/words';
import type { Clue, Standing, SuspectResult, SuspectsResult, SuspectKey, Verdict } from '$lib/model/suspect';
import type { StartRecord } from '$lib/model/start';
import { median } from '../statistics/median';
import { type Context, contextOf, periodContext, sideContext } from './context';
import { eligibleStarts, type SuspectEvidence } from './evidence';
import { scoreRow, type ScoredRow } from './score-row';
import { SUSPECT_TABLE } from './table';
import { slideNotLoading } from './table/load';
import { capacityRuns } from './table/shared';

/** Where the standings begin, in sums of weights [ours]. */
export const STANDING_LIMITS = {
	pointsTo: { score: 0.55, discriminator: 0.28 },
	fits: { score: 0.25, discriminator: 0.14 },
	/** A slow fault on a unit that neither trips nor stalls must speak louder. */
	withoutSymptom: { score: 0.5, discriminator: 0.4, alone: 0.55 }
} as const;

/** Clues of one start are kept from this weight on. */
const START_CLUE_WEIGHT = 0.08;

function explain(rows: readonly ScoredRow[]): void {
	const before = new Map(rows.map((one) => [one.row.key, { score: one.score, discriminator: one.discriminator }]));
	for (const one of rows) {
		for (const { key, share } of one.row.explainedBy ?? []) {
			const other = before.get(key);
			if (!other || other.discriminator < STANDING_LIMITS.fits.discriminator || one.score <= 0) continue;
			const weight = Math.min(1, share * other.score);
			if (weight < START_CLUE_WEIGHT) continue;
			one.score -= weight;
			one.clues.push({
				key: `explained-by-${key}`,
				direction: 'against',
				weight,
				sentence: `${SUSPECT_WORDS[key]} would bring this signature with it, and has clues of its own.`,
				figures: {},
				starts: []
			});
		}
	}
}

function standingOf(one: ScoredRow, coarse: boolean): Standing {
	const { pointsTo, fits } = STANDING_LIMITS;
	if (one.overruled) return 'speaks-against';
	if (one.score >= pointsTo.score && one.discriminator >= pointsTo.discriminator) return coarse ? 'fits' : 'points-to';
	if (one.score >= fits.score && one.discriminator >= fits.discriminator) return 'fits';
	return one.score <= -0.25 ? 'speaks-against' : 'cannot-tell';
}

/** Is the spacing too coarse for the order of things: over a third of the time to trip? */
function isCoarse(bad: readonly StartRecord[]): boolean {
	const shares = bad.map(
		(start) => (3 * start.spacingSeconds * 1000) / ((start.endedAt ?? Infinity) - start.startedAt)
	);
	return (median(shares) ?? 0) > 1;
}

const STANDING_ORDER: Readonly<Record<Standing, number>> = {
	'points-to': 0,
	fits: 0,
	'cannot-tell': 1,
	'speaks-against': 2
};

function ranked(rows: readonly ScoredRow[], coarse: boolean): SuspectResult[] {
	const judged = rows.map((one, order) => ({ one, order, standing: standingOf(one, coarse) }));
	judged.sort(
		(a, b) => STANDING_ORDER[a.standing] - STANDING_ORDER[b.standing] || b.one.score - a.one.score || a.order - b.order
	);
	return judged.map(({ one, standing }, i) => ({
		key: one.row.key,
		rank: i + 1,
		standing,
		clues: [...one.clues].sort((a, b) => directionOrder(a) - directionOrder(b) || b.weight - a.weight),
		decisiveCheck: one.row.check
	}));
}

const directionOrder = (clue: Clue) => ['for', 'against', 'missing'].indexOf(clue.direction);

/** Trips, or (on a slide: steps stand still between their stages) stalls in a fair share of the long runs. */
function hasSymptom(context: Context): boolean {
	const runs = capacityRuns(context).length;
	const slides = slideNotLoading.applies(context.nature) > 0;
	return context.bad.length > 0 || (slides && context.stalls.length >= Math.max(1, 0.12 * runs));
}

/** What a log must hold before "nothing points to a fault" may be said: the low side, and how the machine is loaded. */
function seesEnough(context: Context): boolean {
	const low = context.reader.has('evapSaturation') || context.reader.has('evapPressure');
	const load = (['capacity', 'motorCurrent', 'power', 'speed'] as const).some((id) => context.reader.has(id));
	return low && load && context.starts.length > 0;
}

/** Loud enough to be named on a unit that neither trips nor stalls: two clues at least, or one that is loud alone. */
function isLoud(one: ScoredRow): boolean {
	const { score, discriminator, alone } = STANDING_LIMITS.withoutSymptom;
	const witnesses = one.clues.filter((clue) => clue.direction === 'for' && clue.weight >= 0.1).length;
	return (
		one.row.showsWithoutSymptom === true &&
		one.score >= score &&
		one.discriminator >= discriminator &&
		(witnesses > 1 || one.discriminator >= alone)
	);
}

function verdictOf(context: Context, rows: readonly ScoredRow[]): Verdict {
	const symptom = hasSymptom(context);
	const { fits } = STANDING_LIMITS;
	const named = rows.some((one) =>
		symptom ? one.score >= fits.score && one.discriminator >= fits.discriminator : isLoud(one)
	);
	if (named) return 'fault-pattern';
	return symptom || !seesEnough(context) ? 'cannot-tell' : 'no-fault-pattern';
}

/** Signals whose lack keeps suspects apart, the most telling first. */
function missingSignals(rows: readonly ScoredRow[]): string[] {
	const weights = new Map<string, number>();
	for (const one of rows) for (const [id, weight] of one.missing) weights.set(id, (weights.get(id) ?? 0) + weight);
	return [...weights].sort((a, b) => b[1] - a[1]).map(([id]) => id);
}

/** Without a symptom only slow faults that speak loudly keep their standing. */
function quieten(context: Context, suspects: SuspectResult[], rows: readonly ScoredRow[]): SuspectResult[] {
	if (hasSymptom(context)) return suspects;
	const loud = new Set(rows.filter(isLoud).map((one) => one.row.key));
	return suspects
		.map((suspect) => {
			const stands = suspect.standing === 'points-to' || suspect.standing === 'fits';
			return stands && !loud.has(suspect.key) ? { ...suspect, standing: 'cannot-tell' as const } : suspect;
		})
		.sort((a, b) => STANDING_ORDER[a.standing] - STANDING_ORDER[b.standing] || a.rank - b.rank)
		.map((suspect, i) => ({ ...suspect, rank: i + 1 }));
}

/** Every row that applies, each read from the trips that speak about its side. */
function scoreRows(evidence: SuspectEvidence, context: Context): ScoredRow[] {
	const sides = {
		'low-side': sideContext(evidence, context, 'low-side'),
		head: sideContext(evidence, context, 'head')
	};
	return SUSPECT_TABLE.map((row) => scoreRow(row, row.trips ? sides[row.trips] : context)).filter(
		(one) => one !== null
	);
}

/**
 * Judges every suspect on the evidence of one circuit: clues for, against and missing, standing and rank, and the
 * verdict over all. Pure; the same evidence gives the same answer. Needs the circuit's series, so that windows the
 * stored figures do not hold can be read. Method: method.md, "Suspects"; signatures: common practice, no source.
 */
export function evaluateSuspects(evidence: SuspectEvidence): SuspectsResult {
	const context = periodContext(evidence);
	const rows = scoreRows(evidence, context);
	explain(rows);
	const verdict = verdictOf(context, rows);
	const suspects = quieten(context, ranked(rows, isCoarse(context.bad)), rows);
	return { verdict, suspects, missingSignals: missingSignals(rows) };
}

/** A clue of one start, with the suspect it speaks about. */
export type StartClue = Clue & { suspect: SuspectKey };

/**
 * The clues that one start gives, for its sheet: the same table read over this start alone, beside the period's held
 * starts. Only what speaks for or against; what the period says as a whole is left to the Suspects page.
 * @throws RangeError when the start is not one of the evidence's
 */
export function cluesOfStart(evidence: SuspectEvidence, startedAt: number): StartClue[] {
	const start = evidence.starts.find((one) => one.startedAt === startedAt);
	if (!start) throw new RangeError(`no start at ${startedAt} in the evidence`);
	const held = eligibleStarts(evidence.starts).filter((one) => one.outcome === 'held' && one !== start);
	const bad = start.outcome === 'tripped' ? [start] : [];
	const context = contextOf({ ...evidence, checks: [], changes: [] }, [start], bad, held);
	return scoreRows(evidence, context)
		.flatMap(({ row, clues }) =>
			clues
				.filter((clue) => clue.direction !== 'missing' && clue.weight >= START_CLUE_WEIGHT)
				.filter((clue) => clue.starts.includes(startedAt))
				.map((clue) => ({ ...clue, suspect: row.key }))
		)
		.sort((a, b) => directionOrder(a) - directionOrder(b) || b.weight - a.weight);
}
