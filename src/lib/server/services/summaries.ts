import { SUSPECT_WORDS } from '$lib/model/words';
import { may, maySeeSite, type Actor } from '$lib/model/people';
import type { UnitSummary } from '$lib/model/wire/views';
import { now } from '$lib/server/config';
import {
	listCases,
	listSignedSuspects,
	listVisits,
	type CaseRow,
	type VisitRow
} from '$lib/server/repositories/circle';
import { listMembers } from '$lib/server/repositories/identity';
import { listLogStates } from '$lib/server/repositories/logs';
import { listLimits, listSites, listUnits, type SiteRow, type UnitRow } from '$lib/server/repositories/plant';
import { listCircuitResults, listStarts, type CircuitResultRow, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { coverageOf, dayStrips, joinCovered } from './day-strips';
import { countFirstTries, trippedInARow } from './first-tries';
import { siteShape, unitShape } from './plant-shapes';
import { addDays, siteDate } from './site-clock';

/** The Units page: each unit a person may see as one row, worst repeater first. */

const STRIP_DAYS = 14;

type Sources = {
	starts: StartRow[];
	results: CircuitResultRow[];
	cases: CaseRow[];
	visits: VisitRow[];
	logStates: { unitId: string; state: string }[];
	settled: ReadonlySet<string>;
	names: ReadonlyMap<string, string>;
};

type Verdicts = Pick<UnitSummary, 'verdict' | 'leading' | 'withheld'>;

/** The worst circuit's verdict and leading suspect; a client sees only what a signed check settled. */
function verdictsOf(actor: Actor, results: readonly CircuitResultRow[], settled: boolean): Verdicts {
	const verdicts = results.map((row) => row.suspects.si);
	const order = ['fault-pattern', 'cannot-tell', 'no-fault-pattern'] as const;
	const worst = order.flatMap((verdict) => verdicts.filter((entry) => entry.verdict === verdict))[0];
	if (!worst) return { verdict: null, leading: null, withheld: false };
	if (!may(actor, 'readSuspects') && !settled) return { verdict: null, leading: null, withheld: true };
	const first = worst.suspects[0];
	const leads = worst.verdict === 'fault-pattern' && first;
	return {
		verdict: worst.verdict,
		leading: leads ? { key: first.key, name: SUSPECT_WORDS[first.key], standing: first.standing } : null,
		withheld: false
	};
}

function openCaseOf(cases: readonly CaseRow[]): UnitSummary['openCase'] {
	const open = cases.find((entry) => entry.state !== 'closed');
	return open
		? { id: open.id, number: `C-${open.number}`, openedAt: open.openedAt.toISOString(), state: open.state }
		: null;
}

function nextVisitOf(
	visits: readonly VisitRow[],
	today: string,
	names: ReadonlyMap<string, string>
): UnitSummary['nextVisit'] {
	const next = visits.find((visit) => visit.date >= today && visit.leftAt === null);
	if (!next) return null;
	return {
		id: next.id,
		date: next.date,
		beThereBy: next.beThereBy,
		who: next.technicianId ? (names.get(next.technicianId) ?? null) : null
	};
}

function summary(actor: Actor, unit: UnitRow, site: SiteRow, shaped: UnitSummary['unit'], from: Sources): UnitSummary {
	const all = from.starts.filter((row) => row.unitId === unit.id);
	const rows = all.filter((row) => row.source === 'log');
	const results = from.results.filter((row) => row.unitId === unit.id);
	const covered = joinCovered(results.map((row) => row.covered));
	const lastAt = covered.at(-1)?.[1] ?? null;
	// Where nothing is logged the record of starts gives the last day.
	const to = siteDate(lastAt ?? all.at(-1)?.startedAt ?? now().getTime(), site.timeZone);
	const records = rows.map((row) => row.record);
	const first = records.filter((record) => record.firstStart && !record.attended).slice(-10);
	const states = from.logStates.filter((row) => row.unitId === unit.id).map((row) => row.state);
	const count = (...wanted: string[]): number => states.filter((state) => wanted.includes(state)).length;
	const begin = covered[0]?.[0] ?? null;
	return {
		unit: shaped,
		site: siteShape(site),
		starts: rows.length,
		startupTrips: records.filter((record) => record.startupTrip).length,
		noted: all.length - rows.length,
		firstTries: countFirstTries(records),
		lastFirst: first.map((record) => record.outcome),
		trippedInARow: trippedInARow(records),
		...verdictsOf(actor, results, from.settled.has(unit.id)),
		coverage: begin === null || lastAt === null ? null : coverageOf(covered, begin, lastAt),
		strip: dayStrips(all, covered, addDays(to, 1 - STRIP_DAYS), to, site.timeZone, lastAt ?? 0),
		openCase: openCaseOf(from.cases.filter((row) => row.unitId === unit.id)),
		nextVisit: nextVisitOf(
			from.visits.filter((row) => row.unitId === unit.id),
			siteDate(now().getTime(), site.timeZone),
			from.names
		),
		logs: {
			ready: count('ready'),
			waiting: count('needs-mapping'),
			refused: count('refused'),
			reading: count('received', 'reading', 'analysing')
		}
	};
}

/** Worst first: by the low end of the trip rate's interval, then start-up trips, then later trips. */
function worstFirst(a: UnitSummary, b: UnitSummary): number {
	const low = (entry: UnitSummary): number => entry.firstTries.low ?? -1;
	const verdict = (entry: UnitSummary): number => (entry.verdict === 'fault-pattern' ? 1 : 0);
	return (
		low(b) - low(a) || b.startupTrips - a.startupTrips || verdict(b) - verdict(a) || (a.unit.tag < b.unit.tag ? -1 : 1)
	);
}

function titleOf(rows: readonly UnitSummary[]): string {
	const worst = rows[0];
	if (!worst) return 'No unit yet';
	const { k, m } = worst.firstTries;
	if (k > 0) return `${worst.unit.tag} at ${worst.site.name} tripped on ${k} of ${m} first tries`;
	const reading = rows.reduce((sum, row) => sum + row.logs.reading, 0);
	if (rows.every((row) => row.starts === 0))
		return reading > 0 ? 'The first logs are being read' : 'No start in these logs yet';
	return 'No start-up trip in these logs';
}

/** The rows of the Units page and its heading. */
export async function unitSummaries(actor: Actor, siteId?: string): Promise<{ units: UnitSummary[]; title: string }> {
	const names = new Map((await listMembers(actor.organisationId)).map((member) => [member.personId, member.name]));
	const units = await withOrganisation(actor.organisationId, async (tx) => {
		const sites = new Map((await listSites(tx)).map((site) => [site.id, site]));
		const rows = (await listUnits(tx, siteId)).filter((unit) => maySeeSite(actor, unit.siteId));
		const ids = rows.map((unit) => unit.id);
		const limits = await listLimits(tx, ids);
		const sources: Sources = {
			starts: await listStarts(tx, ids, { source: 'all' }),
			results: await listCircuitResults(tx, ids),
			cases: await listCases(tx, ids),
			visits: await listVisits(tx, ids),
			logStates: await listLogStates(tx, ids),
			settled: new Set((await listSignedSuspects(tx, ids)).map((row) => row.unitId)),
			names
		};
		return rows.flatMap((unit) => {
			const site = sites.get(unit.siteId);
			return site ? [summary(actor, unit, site, unitShape(unit, limits), sources)] : [];
		});
	});
	units.sort(worstFirst);
	return { units, title: titleOf(units) };
}
