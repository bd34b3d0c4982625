import { AppError, notFound } from '$lib/model/errors';
import { may, type Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import type { SuspectKey } from '$lib/model/suspect';
import type { Check, CheckInput } from '$lib/model/wire/field';
import { demand } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { enqueueAnalysis } from '$lib/server/jobs/queue';
import { recordAudit } from '$lib/server/repositories/audit';
import {
	findCheck,
	findVisit,
	insertCheck,
	listChecks,
	listVisits,
	updateCheck,
	type CheckRow
} from '$lib/server/repositories/circle';
import { listMembers } from '$lib/server/repositories/identity';
import { listPhotos } from '$lib/server/repositories/photos';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { completeCheck, judgeCheck, type AnyCheck, type CheckUnit } from '$lib/utils/field-check';
import { caseForWork, noteOnCase } from './case-timeline';
import { checkShape, checkUnitOf, judgementOf, type Names } from './check-shapes';
import { visibleUnit } from './units';

/** Field checks: what a person measured or did at a unit. */

/** A phone's clock may be ahead of ours by this much. */
const CLOCK_SLACK = 5 * 60_000;

/** When something happened: not in the future. @throws AppError `invalid` */
export function happenedAt(at: string | undefined): Date {
	const when = at ? new Date(at) : now();
	if (when.getTime() > now().getTime() + CLOCK_SLACK)
		throw new AppError('invalid', 'The time is in the future.', {
			errors: [{ field: 'at', message: 'in the future' }]
		});
	return when;
}

/** @throws AppError `invalid` for a circuit the unit does not have */
export function circuitFits(circuit: string | null, unit: { circuits: number; tag: string }): void {
	if (circuit === null || (/^[1-4]$/.test(circuit) && Number(circuit) <= unit.circuits)) return;
	throw new AppError('invalid', `${unit.tag} has no circuit ${circuit}.`, {
		errors: [{ field: 'circuit', message: 'not there' }]
	});
}

export async function memberNames(organisationId: string): Promise<Names> {
	return new Map((await listMembers(organisationId)).map((member) => [member.personId, member.name]));
}

/** A unit's checks, oldest first. A client sees the signed ones. */
export async function checksOf(actor: Actor, unitId: string, system: UnitSystem): Promise<Check[]> {
	const names = await memberNames(actor.organisationId);
	return withOrganisation(actor.organisationId, async (tx) => {
		const { unit, site } = await visibleUnit(tx, actor, unitId);
		const { air } = await checkUnitOf(tx, unit, site);
		const photos = await listPhotos(tx, unitId);
		const rows = (await listChecks(tx, unitId)).filter((row) => may(actor, 'readSuspects') || row.signedAt !== null);
		return rows.map((row) => checkShape(row, photos, names, system, air));
	});
}

/** What the forms know of the unit: its oil band, tolerances, curves. */
export async function checkFormOf(actor: Actor, unitId: string): Promise<CheckUnit> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { unit, site } = await visibleUnit(tx, actor, unitId);
		return checkUnitOf(tx, unit, site);
	});
}

/** The visit that work belongs to: the one that was named, or the unit's that is going on at that instant. */
async function visitForWork(tx: Tx, unitId: string, at: Date, named: string | null): Promise<string | null> {
	if (named) return (await findVisit(tx, named))?.unitId === unitId ? named : null;
	const going = (await listVisits(tx, [unitId])).find(
		(visit) => visit.arrivedAt !== null && visit.arrivedAt <= at && (visit.leftAt === null || visit.leftAt >= at)
	);
	return going?.id ?? null;
}

/**
 * Records a check. Where the form's conditions were not met it is kept as found and marked indicative, with the reason.
 * The same client key again gives the first one back and changes nothing.
 */
export async function recordCheck(
	actor: Actor,
	unitId: string,
	input: CheckInput,
	system: UnitSystem
): Promise<{ check: Check; repeated: boolean }> {
	demand(actor, 'field');
	const names = await memberNames(actor.organisationId);
	const at = happenedAt(input.at);
	const result = await withOrganisation(actor.organisationId, async (tx) => {
		const { unit, site } = await visibleUnit(tx, actor, unitId);
		circuitFits(input.circuit, unit);
		const known = await checkUnitOf(tx, unit, site);
		const completed = completeCheck({ kind: input.kind, readings: input.readings } as AnyCheck, known);
		const { reasons, sentence } = judgeCheck(completed, 'si', known.air);
		const all = input.indicativeReason ? [...reasons, input.indicativeReason] : reasons;
		const owner = await caseForWork(tx, unitId, input.circuit, input.caseId);
		const { row, repeated } = await insertCheck(tx, {
			organisationId: actor.organisationId,
			clientKey: input.clientKey ?? null,
			unitId,
			circuit: input.circuit,
			caseId: owner?.id ?? null,
			visitId: await visitForWork(tx, unitId, at, input.visitId),
			kind: input.kind,
			readings: completed.readings,
			verdict: sentence,
			indicative: all.length > 0,
			indicativeReason: all.length > 0 ? all.join('; ') : null,
			note: input.note || null,
			at,
			by: actor.personId,
			byName: actor.name,
			suspect: input.suspect ?? (input.kind === 'finding' ? input.readings.suspect : null)
		});
		if (row.unitId !== unitId) throw new AppError('conflict', 'This client key came with a check of another unit.');
		if (!repeated) await tellAboutCheck(tx, actor, row, owner?.id ?? null, sentence);
		return { check: checkShape(row, await listPhotos(tx, unitId), names, system, known.air), repeated };
	});
	if (!result.repeated) await enqueueAnalysis({ organisationId: actor.organisationId, unitId });
	return result;
}

async function tellAboutCheck(
	tx: Tx,
	actor: Actor,
	row: CheckRow,
	caseId: string | null,
	sentence: string
): Promise<void> {
	await recordAudit(tx, actor, { action: 'added', subject: 'check', subjectId: row.id, after: row.readings });
	if (!caseId) return;
	const text = `${sentence}${row.indicative ? ' Indicative only.' : ''}`;
	await noteOnCase(tx, actor, caseId, {
		kind: 'check',
		text,
		link: `/units/${row.unitId}/checks#${row.id}`,
		at: row.at
	});
}

/**
 * Signs a check: only then may a client see the suspect it settles.
 * @throws AppError `forbidden` for anyone but a technician or an engineer, `conflict` when it is signed already
 */
export async function signCheck(
	actor: Actor,
	checkId: string,
	suspect: SuspectKey | null | undefined,
	system: UnitSystem
): Promise<Check> {
	demand(actor, 'field');
	if (actor.role !== 'technician' && actor.role !== 'engineer')
		throw new AppError('forbidden', 'A technician or an engineer signs a check.');
	const names = await memberNames(actor.organisationId);
	const check = await withOrganisation(actor.organisationId, async (tx) => {
		const before = await findCheck(tx, checkId);
		if (!before) throw notFound('check');
		const { unit, site } = await visibleUnit(tx, actor, before.unitId);
		if (before.signedAt) throw new AppError('conflict', 'This check is signed already.');
		const change = {
			signedAt: now(),
			signedBy: actor.personId,
			...(suspect === undefined ? {} : { suspect })
		};
		await updateCheck(tx, checkId, change);
		const { air } = await checkUnitOf(tx, unit, site);
		const row = { ...before, ...change };
		await recordAudit(tx, actor, { action: 'signed', subject: 'check', subjectId: checkId, after: change });
		if (row.caseId)
			await noteOnCase(tx, actor, row.caseId, {
				kind: 'signed',
				text: `Signed: ${judgementOf(row, 'si', air).sentence}`,
				link: `/units/${row.unitId}/checks#${row.id}`
			});
		return checkShape(row, await listPhotos(tx, unit.id), names, system, air);
	});
	await enqueueAnalysis({ organisationId: actor.organisationId, unitId: check.unitId });
	return check;
}
