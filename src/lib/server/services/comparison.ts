import { AppError } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import type { Quantity, UnitSystem } from '$lib/model/quantities';
import type { StartRecord } from '$lib/model/start';
import type { Comparison, Envelope } from '$lib/model/wire/comparison';
import { compareGroups, GroupExpressionError, type ComparisonResult } from '$lib/server/analysis/comparison';
import { listCircuitResults, listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { circuitInputs } from './analysing';
import { factsOf } from './facts';
import { inUnits, iso, unitsObject } from './start-shapes';
import { visibleUnit } from './units';

export type ComparisonQuery = {
	a?: string | undefined;
	b?: string | undefined;
	circuit?: string | undefined;
	from?: string | undefined;
	to?: string | undefined;
};

/** Twelve weeks and one: a season is compared at most, unless a period is asked for. */
const SEASON_MS = 91 * 86_400_000;

type Ids = (start: StartRecord) => string;

const groupShape = ({ expression, label, firstTries, starts }: ComparisonResult['a'], idOf: Ids) => ({
	expression,
	label,
	firstTries: { k: firstTries.k, m: firstTries.m, low: firstTries.low, high: firstTries.high },
	starts: starts.map((start) => ({ id: idOf(start), startedAt: iso(start.startedAt), outcome: start.outcome }))
});

function sideShape(side: Envelope['a'], quantity: Quantity, system: UnitSystem): Envelope['a'] {
	const all = (values: (number | null)[]) =>
		values.map((value) => (value === null ? null : inUnits(value, quantity, system)));
	return { ...side, median: all(side.median), low: all(side.low), high: all(side.high) };
}

/** The result in the units asked for, starts by their ids. */
function comparisonShape(result: ComparisonResult, idOf: Ids, system: UnitSystem): Comparison {
	const say = (value: number | null, quantity: Quantity) => (value === null ? null : inUnits(value, quantity, system));
	const { sentences, chance, coverageSentence, tooFew, footnote, horizonSeconds, crossTable, presets } = result;
	return {
		sentences,
		chance,
		coverageSentence,
		tooFew,
		a: groupShape(result.a, idOf),
		b: groupShape(result.b, idOf),
		differences: result.differences.map((row) => ({
			...row,
			a: say(row.a, row.quantity),
			b: say(row.b, row.quantity),
			shift: say(row.shift, row.shiftQuantity),
			low: say(row.low, row.shiftQuantity),
			high: say(row.high, row.shiftQuantity)
		})),
		footnote,
		landmarks: result.landmarks.map((mark) => ({
			...mark,
			rows: mark.rows.map((row) => ({ ...row, a: say(row.a, row.quantity), b: say(row.b, row.quantity) }))
		})),
		envelopes: result.envelopes.map((envelope) => ({
			...envelope,
			a: sideShape(envelope.a, envelope.quantity, system),
			b: sideShape(envelope.b, envelope.quantity, system)
		})),
		horizonSeconds,
		crossTable,
		presets,
		units: unitsObject(system)
	};
}

/**
 * Two groups of a unit's starts side by side; first starts that tripped and that held unless other groups are asked for.
 * @throws AppError `invalid` that says what is wrong with a group expression
 */
export async function comparisonOf(
	actor: Actor,
	unitId: string,
	query: ComparisonQuery,
	system: UnitSystem
): Promise<Comparison> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { unit, site } = await visibleUnit(tx, actor, unitId);
		const circuit = query.circuit ?? '1';
		const result = (await listCircuitResults(tx, [unitId])).find((row) => row.circuit === circuit);
		const covered = (result?.covered ?? []).map(([from, to]) => ({ from, to }));
		const to = query.to ? Date.parse(query.to) : (covered.at(-1)?.to ?? 0);
		const from = query.from ? Date.parse(query.from) : Math.max(to - SEASON_MS, covered[0]?.from ?? 0);
		const rows: StartRow[] = await listStarts(tx, [unitId], { from, to, circuit });
		const ids = new Map(rows.map((row) => [row.startedAt, row.id]));
		const idOf: Ids = (start) => ids.get(start.startedAt) ?? '';
		const input =
			(await circuitInputs(tx, unit, site, { from, to: to + 86_400_000 })).find((entry) => entry.circuit === circuit) ??
			null;
		try {
			const compared = compareGroups({
				starts: rows.map((row) => row.record),
				a: query.a ?? 'first&outcome:tripped',
				b: query.b ?? 'first&outcome:held',
				timeZone: site.timeZone,
				changes: (await factsOf(tx, unitId))(circuit).changes,
				idOf,
				covered,
				period: { from, to },
				input,
				units: system
			});
			return comparisonShape(compared, idOf, system);
		} catch (error) {
			if (error instanceof GroupExpressionError)
				throw new AppError('invalid', error.message, { errors: [{ field: error.term, message: error.message }] });
			throw error;
		}
	});
}
