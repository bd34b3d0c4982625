import { may, type Actor } from '$lib/model/people';
import type { Case, CaseProof, CaseRow as CaseAnswer, TimelineItem } from '$lib/model/wire/case';
import { now } from '$lib/server/config';
import type { CaseRow, VisitRow } from '$lib/server/repositories/circle';
import type { SiteRow, UnitRow } from '$lib/server/repositories/plant';
import type { Names } from './check-shapes';
import { siteDate } from './site-clock';

/** Cases as the API answers them. */

export const caseNumber = (row: { number: number }): string => `C-${row.number}`;

/** What a client reads of a timeline: what happened, not what was suspected on the way. */
const FOR_CLIENTS: ReadonlySet<string> = new Set([
	'opened',
	'visit',
	'change',
	'signed',
	'proved',
	'report',
	'closed',
	'reopened'
]);

const entryShape = ({ at, by, kind, text, link }: CaseRow['timeline'][number]): TimelineItem => ({
	at,
	by,
	kind,
	text,
	link: link ?? null
});

function timelineFor(actor: Actor, row: CaseRow): TimelineItem[] {
	const all = may(actor, 'readSuspects');
	return row.timeline
		.filter((entry) => all || FOR_CLIENTS.has(entry.kind))
		.map(entryShape)
		.sort((a, b) => (a.at < b.at ? -1 : a.at > b.at ? 1 : 0));
}

export type CaseAround = { unit: UnitRow; site: SiteRow; visits: readonly VisitRow[]; names: Names };

function nextVisit(row: CaseRow, { site, visits }: CaseAround): CaseAnswer['nextVisit'] {
	const today = siteDate(now().getTime(), site.timeZone);
	const next = visits.find((visit) => visit.caseId === row.id && visit.date >= today && visit.leftAt === null);
	return next ? { id: next.id, date: next.date, beThereBy: next.beThereBy } : null;
}

/** A case as a row of the board. */
export function caseRowShape(actor: Actor, row: CaseRow, around: CaseAround): CaseAnswer {
	const { unit, site, names } = around;
	return {
		id: row.id,
		number: caseNumber(row),
		unitId: row.unitId,
		unitTag: unit.tag,
		siteId: site.id,
		siteName: site.name,
		timeZone: site.timeZone,
		circuit: row.circuit,
		complaint: row.complaint,
		caller: row.caller ?? '',
		since: row.since ?? '',
		howOften: row.howOften ?? '',
		resets: row.resets ?? '',
		state: row.state,
		assignedTo: row.assignedTo ? { id: row.assignedTo, name: names.get(row.assignedTo) ?? 'left' } : null,
		openedFrom: row.openedFrom,
		openedAt: row.openedAt.toISOString(),
		closedAt: row.closedAt?.toISOString() ?? null,
		closeReason: row.closeReason,
		nextVisit: nextVisit(row, around),
		lastEntry: timelineFor(actor, row).at(-1) ?? null
	};
}

/** A whole case. */
export function caseShape(actor: Actor, row: CaseRow, around: CaseAround, proof: CaseProof | null): Case {
	return {
		...caseRowShape(actor, row, around),
		startIds: row.startIds,
		logIds: row.logIds,
		comparisons: row.comparisons,
		timeline: timelineFor(actor, row),
		proof,
		mayClose: proof?.state === 'changed'
	};
}
