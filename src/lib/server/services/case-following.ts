import { TRIP_KIND_WORDS } from '$lib/model/words';
import type { TripKind } from '$lib/model/start';
import { listCases, updateCase, type CaseRow } from '$lib/server/repositories/circle';
import { listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { latestChangeOf, proofOfCase } from './case-proof';
import { caseNumber } from './case-shapes';
import { noteOnCase } from './case-timeline';
import { systemActor } from './system-actor';

/** After every analysis: a case is proved, or comes back, by itself. */

const DAY = 86_400_000;
/** Trips of this long before the call tell which kind the case is about (method.md, "Proof after a change"). */
const BEFORE = 28 * DAY;

export type CaseNews = { caseId: string; kind: 'reopened' | 'proved'; text: string; startId: string | null };

/** Where the watch for a matching trip begins: the change, or what was known when the case was closed. */
async function watchedFrom(tx: Tx, row: CaseRow): Promise<number | null> {
	if (row.watchFrom) return row.watchFrom.getTime();
	const change = await latestChangeOf(tx, row);
	return change?.at.getTime() ?? row.closedAt?.getTime() ?? null;
}

/** The kinds of start-up trips the case is about; empty when its logs show none, and any kind matches then. */
function kindsOf(row: CaseRow, trips: readonly StartRow[], until: number): Set<TripKind> {
	const attached = new Set(row.startIds);
	const opened = row.openedAt.getTime();
	const telling = trips.filter(
		({ id, startedAt }) =>
			attached.has(id) || (startedAt >= opened - BEFORE && startedAt <= Math.min(until, opened + DAY))
	);
	return new Set(telling.flatMap(({ record }) => (record.trip ? [record.trip.kind] : [])));
}

/** The first unattended start-up trip of the case's kind and circuit after the watch began, or null. */
export function matchingTrip(row: CaseRow, starts: readonly StartRow[], from: number): StartRow | null {
	const trips = starts.filter(
		({ circuit, record }) =>
			record.startupTrip && !record.attended && record.trip && (row.circuit === null || row.circuit === circuit)
	);
	const kinds = kindsOf(row, trips, from);
	return (
		trips.find(
			({ startedAt, record }) => startedAt > from && record.trip && (kinds.size === 0 || kinds.has(record.trip.kind))
		) ?? null
	);
}

async function reopen(tx: Tx, row: CaseRow, trip: StartRow): Promise<CaseNews> {
	const kind = TRIP_KIND_WORDS[trip.record.trip?.kind ?? 'unknown'];
	const text = `Came back: a start-up trip on ${kind} after the ${row.state === 'closed' ? 'case was closed' : 'change'}.`;
	await updateCase(tx, row.id, { state: 'reopened', closedAt: null, closeReason: null });
	await noteOnCase(tx, null, row.id, {
		kind: 'reopened',
		text,
		link: `/units/${row.unitId}/starts/${trip.id}`
	});
	return { caseId: row.id, kind: 'reopened', text: `${caseNumber(row)}. ${text}`, startId: trip.id };
}

/**
 * Follows a unit's cases after its starts were computed anew: reopens one whose kind of start-up trip came back since
 * the change (or since it was closed), and marks one as proved when the starts since the change prove it.
 */
export async function followCases(job: { organisationId: string; unitId: string }): Promise<CaseNews[]> {
	const news: CaseNews[] = [];
	const waiting = await withOrganisation(job.organisationId, async (tx) => {
		const rows = await listCases(tx, [job.unitId]);
		const starts = await listStarts(tx, [job.unitId]);
		const changed: CaseRow[] = [];
		for (const row of rows) {
			if (row.state !== 'changed' && row.state !== 'proved' && row.state !== 'closed') continue;
			const from = await watchedFrom(tx, row);
			const trip = from === null ? null : matchingTrip(row, starts, from);
			if (trip) news.push(await reopen(tx, row, trip));
			else if (row.state === 'changed') changed.push(row);
		}
		return changed;
	});
	for (const row of waiting) {
		const proof = await proofOfCase(systemActor(job.organisationId), row, 'si');
		if (proof?.state !== 'changed') continue;
		const text = proof.sentences[0] ?? 'The starts since the change prove that something changed.';
		await withOrganisation(job.organisationId, async (tx) => {
			await updateCase(tx, row.id, { state: 'proved' });
			await noteOnCase(tx, null, row.id, { kind: 'proved', text });
		});
		news.push({ caseId: row.id, kind: 'proved', text: `${caseNumber(row)}. ${text}`, startId: null });
	}
	return news;
}
