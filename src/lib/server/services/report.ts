import { AppError, notFound } from '$lib/model/errors';
import { may, type Actor } from '$lib/model/people';
import { airPressure, type UnitSystem } from '$lib/model/quantities';
import { SUSPECT_WORDS, TRIP_KIND_WORDS } from '$lib/model/words';
import type { SuspectKey } from '$lib/model/suspect';
import type { Report, reportInputSchema } from '$lib/model/wire/visit';
import { countWords } from '$lib/server/analysis/wording/quantity-words';
import { demand } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { recordAudit } from '$lib/server/repositories/audit';
import { listChanges, listChecks, updateVisit, type CheckRow, type VisitRow } from '$lib/server/repositories/circle';
import { listMembers } from '$lib/server/repositories/identity';
import { listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';
import type { z } from 'zod';
import { proofOfCase } from './case-proof';
import { judgementOf } from './check-shapes';
import { countFirstTries } from './first-tries';
import { shortDate, siteDate } from './site-clock';
import { visibleVisit } from './visits';
import type { VisitAround } from './visit-shapes';

/** The report of a visit to the client: drafted from the record, worded and approved by a person before it goes out. */

type Ground = {
	row: VisitRow;
	around: Omit<VisitAround, 'names'>;
	checks: CheckRow[];
	changes: Awaited<ReturnType<typeof listChanges>>;
	starts: StartRow[];
};

/** Of the visit itself, or of its case. */
function belongs(entry: { caseId: string | null; visitId?: string | null }, row: VisitRow): boolean {
	return entry.visitId === row.id || (row.caseId !== null && entry.caseId === row.caseId);
}

async function groundOf(actor: Actor, visitId: string): Promise<Ground> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { row, around } = await visibleVisit(tx, actor, visitId);
		return {
			row,
			around,
			checks: (await listChecks(tx, row.unitId)).filter((check) => check.signedAt !== null && belongs(check, row)),
			changes: (await listChanges(tx, row.unitId)).filter((change) => belongs(change, row)),
			starts: await listStarts(tx, [row.unitId])
		};
	});
}

function draftWrong({ starts, checks }: Ground): string {
	const records = starts.map((start) => start.record);
	const { m, k } = countFirstTries(records);
	const kind = records.filter((record) => record.startupTrip && record.trip).at(-1)?.trip?.kind;
	const settled = checks.flatMap((check) =>
		check.suspect ? [SUSPECT_WORDS[check.suspect as SuspectKey].toLowerCase()] : []
	);
	const tripped =
		k > 0
			? `${k} of ${countWords(m, 'first try', 'first tries')} of the chiller stopped again soon after the start${kind ? `, on ${TRIP_KIND_WORDS[kind]}` : ''}.`
			: 'The chiller was looked at without a trip in its logs.';
	return settled.length > 0 ? `${tripped} The cause that was found: ${[...new Set(settled)].join(', ')}.` : tripped;
}

function draftFound({ checks, around }: Ground, system: UnitSystem): string {
	const air = airPressure(around.site.altitude ?? 0);
	if (checks.length === 0) return 'From the trend logs of the controller.';
	return checks.map((check) => judgementOf(check, system, air).sentence).join(' ');
}

function draftDone({ changes, row, around }: Ground): string {
	const done = changes.map((change) =>
		`${shortDate(siteDate(change.at.getTime(), around.site.timeZone))}: ${change.text}.`.replaceAll('..', '.')
	);
	if (row.result) done.push(row.result);
	return done.length > 0 ? done.join(' ') : 'Nothing was changed on this visit.';
}

async function addressesOf(actor: Actor, { around }: Ground): Promise<string[]> {
	const contacts = around.site.contacts.filter(({ email, report }) => email && report).map(({ email }) => email);
	const clients = (await listMembers(actor.organisationId))
		.filter(
			({ role, leftAt, siteIds }) =>
				role === 'client' && !leftAt && (siteIds === null || siteIds.includes(around.site.id))
		)
		.map(({ email }) => email);
	return [...new Set([...contacts, ...clients])];
}

/** The report of a visit: as a person wrote it, or drafted from the record. A client sees it once it was sent. */
export async function reportOf(actor: Actor, visitId: string, system: UnitSystem): Promise<Report> {
	const ground = await groundOf(actor, visitId);
	const { row, around, checks } = ground;
	if (!may(actor, 'readSuspects') && !row.report?.sentAt) throw notFound('report');
	const owner = around.cases.find((entry) => entry.id === row.caseId) ?? null;
	const proof = owner ? await proofOfCase(actor, owner, system) : null;
	const air = airPressure(around.site.altitude ?? 0);
	const kept = row.report;
	return {
		visitId: row.id,
		unitTag: around.unit.tag,
		siteName: around.site.name,
		date: row.date,
		wrong: kept?.wrong ?? draftWrong(ground),
		found: kept?.found ?? draftFound(ground, system),
		done: kept?.done ?? draftDone(ground),
		proof: proof?.sentences ?? ['Nothing was changed yet, so there is nothing to prove.'],
		checks: checks.map((check) => judgementOf(check, system, air).sentence),
		approvedAt: kept?.approvedAt ?? null,
		approvedBy: kept?.approvedBy ?? null,
		sentAt: kept?.sentAt ?? null,
		sentTo: kept?.sentTo ?? [],
		mayGoTo: may(actor, 'plan') ? await addressesOf(actor, ground) : []
	};
}

/** Keeps a report's words; approving them is a second person's look or the same one's on purpose. */
export async function saveReport(
	actor: Actor,
	visitId: string,
	input: z.output<typeof reportInputSchema>,
	system: UnitSystem
): Promise<Report> {
	demand(actor, 'field');
	if (input.approve) demand(actor, 'plan');
	await withOrganisation(actor.organisationId, async (tx) => {
		const { row } = await visibleVisit(tx, actor, visitId);
		const { wrong, found, done, approve } = input;
		const before = row.report;
		const same = before?.wrong === wrong && before.found === found && before.done === done;
		const report = {
			wrong,
			found,
			done,
			approvedAt: approve ? now().toISOString() : same ? (before?.approvedAt ?? null) : null,
			approvedBy: approve ? actor.name : same ? (before?.approvedBy ?? null) : null,
			sentAt: before?.sentAt ?? null,
			sentTo: before?.sentTo ?? []
		};
		await updateVisit(tx, visitId, { report });
		await recordAudit(tx, actor, {
			action: approve ? 'approved' : 'changed',
			subject: 'report',
			subjectId: visitId,
			before,
			after: report
		});
	});
	return reportOf(actor, visitId, system);
}

/** Notes that a report went out. @throws AppError `conflict` when nobody approved its present words */
export async function markReportSent(actor: Actor, visitId: string, to: readonly string[]): Promise<void> {
	await withOrganisation(actor.organisationId, async (tx) => {
		const { row } = await visibleVisit(tx, actor, visitId);
		if (!row.report?.approvedAt)
			throw new AppError(
				'conflict',
				'The report is not approved yet. Somebody reads and approves it before it goes out.'
			);
		const report = { ...row.report, sentAt: now().toISOString(), sentTo: [...new Set([...row.report.sentTo, ...to])] };
		await updateVisit(tx, visitId, { report });
		await recordAudit(tx, actor, { action: 'sent', subject: 'report', subjectId: visitId, after: { to } });
	});
}
