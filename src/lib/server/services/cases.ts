import { AppError, notFound } from '$lib/model/errors';
import { may, maySeeSite, type Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import type { Case, CaseInput, CasePatch, CaseRow as CaseAnswer } from '$lib/model/wire/case';
import { demand } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { recordAudit } from '$lib/server/repositories/audit';
import { findCase, insertCase, listCases, listVisits, updateCase, type CaseRow } from '$lib/server/repositories/circle';
import { listMembers } from '$lib/server/repositories/identity';
import { listLogs } from '$lib/server/repositories/logs';
import { listSites, listUnits } from '$lib/server/repositories/plant';
import { listStarts } from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { proofOfCase } from './case-proof';
import { caseNumber, caseRowShape, caseShape, type CaseAround } from './case-shapes';
import { noteOnCase } from './case-timeline';
import { circuitFits, memberNames } from './checks';
import { visibleUnit } from './units';

/** Cases: from the call to the proof. */

/** A case this person may know of. @throws AppError `not-found` */
async function visibleCase(
	tx: Tx,
	actor: Actor,
	id: string
): Promise<{ row: CaseRow; around: Omit<CaseAround, 'names'> }> {
	const row = await findCase(tx, id);
	if (!row) throw notFound('case');
	const { unit, site } = await visibleUnit(tx, actor, row.unitId).catch(() => {
		throw notFound('case');
	});
	return { row, around: { unit, site, visits: await listVisits(tx, [unit.id]) } };
}

/** The cases a person may see, newest first. */
export async function casesOf(actor: Actor, query: { unit?: string; open?: boolean }): Promise<CaseAnswer[]> {
	const names = await memberNames(actor.organisationId);
	return withOrganisation(actor.organisationId, async (tx) => {
		const sites = new Map((await listSites(tx)).map((site) => [site.id, site]));
		const units = (await listUnits(tx)).filter(
			(unit) => maySeeSite(actor, unit.siteId) && (!query.unit || unit.id === query.unit)
		);
		const ids = units.map((unit) => unit.id);
		const visits = await listVisits(tx, ids);
		return (await listCases(tx, ids))
			.filter((row) => !query.open || row.state !== 'closed')
			.flatMap((row) => {
				const unit = units.find(({ id }) => id === row.unitId);
				const site = unit && sites.get(unit.siteId);
				return site ? [caseRowShape(actor, row, { unit, site, visits, names })] : [];
			});
	});
}

/** One case with its timeline and the proof so far. */
export async function caseOf(actor: Actor, id: string, system: UnitSystem): Promise<Case> {
	const names = await memberNames(actor.organisationId);
	const { row, around } = await withOrganisation(actor.organisationId, (tx) => visibleCase(tx, actor, id));
	const proof = may(actor, 'readSuspects') || row.state === 'proved' || row.state === 'closed';
	return caseShape(actor, row, { ...around, names }, proof ? await proofOfCase(actor, row, system) : null);
}

/** @throws AppError `invalid` when the person is no member who may see the site */
export async function memberFits(
	actor: Actor,
	personId: string | null | undefined,
	siteId: string,
	field: string
): Promise<void> {
	if (!personId) return;
	const member = (await listMembers(actor.organisationId)).find((entry) => entry.personId === personId);
	const fits =
		member &&
		member.leftAt === null &&
		member.role !== 'client' &&
		(member.siteIds === null || member.siteIds.includes(siteId));
	if (!fits)
		throw new AppError('invalid', 'This person is no member who works at this site.', {
			errors: [{ field, message: 'not a member there' }]
		});
}

async function attachmentsFit(
	tx: Tx,
	unitId: string,
	{ startIds, logIds }: { startIds?: string[] | undefined; logIds?: string[] | undefined }
): Promise<void> {
	const starts = new Set(startIds?.length ? (await listStarts(tx, [unitId])).map((row) => row.id) : []);
	const logs = new Set(logIds?.length ? (await listLogs(tx, unitId)).map((row) => row.id) : []);
	const wrong = startIds?.find((id) => !starts.has(id))
		? 'startIds'
		: logIds?.find((id) => !logs.has(id))
			? 'logIds'
			: null;
	if (wrong)
		throw new AppError('invalid', `Some of ${wrong} are not of this unit.`, {
			errors: [{ field: wrong, message: 'of another unit' }]
		});
}

/** Opens a case. */
export async function openCase(actor: Actor, input: CaseInput, system: UnitSystem): Promise<Case> {
	demand(actor, 'field');
	const id = await withOrganisation(actor.organisationId, async (tx) => {
		const { unit, site } = await visibleUnit(tx, actor, input.unitId);
		circuitFits(input.circuit, unit);
		if (input.assignedTo && !may(actor, 'plan') && input.assignedTo !== actor.personId)
			throw new AppError('forbidden', 'A technician may take a case, not give it to others.');
		await memberFits(actor, input.assignedTo, site.id, 'assignedTo');
		await attachmentsFit(tx, unit.id, input);
		const row = await insertCase(tx, {
			...input,
			organisationId: actor.organisationId,
			openedAt: now(),
			openedBy: actor.via === 'system' ? null : actor.personId
		});
		await noteOnCase(tx, actor, row.id, { kind: 'opened', text: input.complaint });
		await recordAudit(tx, actor, { action: 'opened', subject: 'case', subjectId: row.id, after: input });
		return row.id;
	});
	return caseOf(actor, id, system);
}

const FIELDS = [
	'complaint',
	'caller',
	'since',
	'howOften',
	'resets',
	'circuit',
	'startIds',
	'logIds',
	'comparisons'
] as const;

function attachedWords(row: CaseRow, patch: CasePatch): string[] {
	const counts = [
		['start', (patch.startIds?.length ?? 0) - row.startIds.length, patch.startIds],
		['log', (patch.logIds?.length ?? 0) - row.logIds.length, patch.logIds],
		['comparison', (patch.comparisons?.length ?? 0) - row.comparisons.length, patch.comparisons]
	] as const;
	return counts.flatMap(([word, more, given]) =>
		given && more > 0 ? [`Attached ${more} ${word}${more === 1 ? '' : 's'}.`] : []
	);
}

/** A case is closed with proof, or with a stated reason. @throws AppError `invalid` without either */
async function closing(tx: Tx, row: CaseRow, proved: boolean, reason: string | undefined) {
	if (!proved && !reason)
		throw new AppError('invalid', 'Nothing is proved yet. Close it with a reason, or wait for more clean starts.', {
			errors: [{ field: 'closeReason', message: 'say why it is closed without proof' }]
		});
	const last = (await listStarts(tx, [row.unitId])).at(-1)?.startedAt ?? 0;
	const watchFrom = new Date(Math.max(last, row.watchFrom?.getTime() ?? 0));
	return {
		state: 'closed' as const,
		closedAt: now(),
		closeReason: reason ?? 'proved by the starts since the change',
		watchFrom
	};
}

function demandFor(actor: Actor, patch: CasePatch): void {
	const taking = patch.assignedTo === actor.personId;
	if (patch.state !== undefined || (patch.assignedTo !== undefined && !taking)) demand(actor, 'plan');
}

/** Changes a case: its words, who has it, what is attached, a line of its timeline, closed or reopened by a person. */
export async function changeCase(actor: Actor, id: string, patch: CasePatch, system: UnitSystem): Promise<Case> {
	demand(actor, 'field');
	demandFor(actor, patch);
	const names = await memberNames(actor.organisationId);
	const before = await withOrganisation(actor.organisationId, (tx) => visibleCase(tx, actor, id));
	const proved = patch.state === 'closed' && (await proofOfCase(actor, before.row, 'si'))?.state === 'changed';
	await withOrganisation(actor.organisationId, async (tx) => {
		const { row, around } = await visibleCase(tx, actor, id);
		if (patch.circuit) circuitFits(patch.circuit, around.unit);
		await memberFits(actor, patch.assignedTo, around.site.id, 'assignedTo');
		await attachmentsFit(tx, row.unitId, patch);
		const change: Parameters<typeof updateCase>[2] = {};
		for (const field of FIELDS) if (patch[field] !== undefined) Object.assign(change, { [field]: patch[field] });
		const lines: { kind: string; text: string }[] = attachedWords(row, patch).map((text) => ({
			kind: 'attached',
			text
		}));
		if (patch.assignedTo !== undefined && patch.assignedTo !== row.assignedTo) {
			change.assignedTo = patch.assignedTo;
			const name = patch.assignedTo ? (names.get(patch.assignedTo) ?? 'a member') : 'nobody';
			lines.push({ kind: 'assigned', text: `Given to ${name}.` });
		}
		if (patch.note) lines.push({ kind: 'note', text: patch.note });
		if (patch.state === 'closed' && row.state !== 'closed') {
			const closed = await closing(tx, row, proved, patch.closeReason);
			Object.assign(change, closed);
			lines.push({ kind: 'closed', text: `Closed: ${closed.closeReason}.` });
		}
		if (patch.state === 'reopened' && row.state !== 'reopened') {
			Object.assign(change, { state: 'reopened', closedAt: null, closeReason: null });
			lines.push({ kind: 'reopened', text: `Reopened by ${actor.name}.` });
		}
		if (Object.keys(change).length > 0) await updateCase(tx, id, change);
		for (const line of lines) await noteOnCase(tx, actor, id, line);
		await recordAudit(tx, actor, {
			action: 'changed',
			subject: `case ${caseNumber(row)}`,
			subjectId: id,
			after: patch
		});
	});
	return caseOf(actor, id, system);
}
