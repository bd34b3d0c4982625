import { notFound } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import type { Start, startCorrectionSchema } from '$lib/model/wire/start';
import { demand } from '$lib/server/auth/guard';
import { recordAudit } from '$lib/server/repositories/audit';
import type { SiteRow, UnitRow } from '$lib/server/repositories/plant';
import {
	findStart,
	insertCorrection,
	listCorrections,
	listStarts,
	type StartFilter,
	type StartRow
} from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import type { z } from 'zod';
import { runAnalysis } from './analysing';
import { startShape } from './start-shapes';
import { visibleUnit } from './units';

/** A unit's starts, oldest first. */
export async function startsOf(
	actor: Actor,
	unitId: string,
	filter: StartFilter,
	system: UnitSystem
): Promise<Start[]> {
	return withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		const corrections = await listCorrections(tx, unitId);
		return (await listStarts(tx, [unitId], filter)).map((row) => startShape(row, corrections, system));
	});
}

/** A start with its unit and site, when this person may know of them. @throws AppError `not-found` */
export async function visibleStart(
	tx: Tx,
	actor: Actor,
	startId: string
): Promise<{ row: StartRow; unit: UnitRow; site: SiteRow }> {
	const row = await findStart(tx, startId);
	if (!row) throw notFound('start');
	const { unit, site } = await visibleUnit(tx, actor, row.unitId).catch(() => {
		throw notFound('start');
	});
	return { row, unit, site };
}

/** A person's correction with its reason: kept apart, so that it survives recomputation; the unit is recomputed with it. */
export async function correctStart(
	actor: Actor,
	startId: string,
	input: z.output<typeof startCorrectionSchema>,
	system: UnitSystem
): Promise<Start> {
	demand(actor, 'logs');
	const { organisationId } = actor;
	const unitId = await withOrganisation(organisationId, async (tx) => {
		const { row } = await visibleStart(tx, actor, startId);
		const { reason, startedAt, ...changes } = input;
		const correction = {
			circuit: row.circuit,
			startedAt: row.startedAt,
			...changes,
			...(startedAt ? { newStartedAt: Date.parse(startedAt) } : {}),
			reason
		};
		await insertCorrection(tx, {
			organisationId,
			unitId: row.unitId,
			circuit: row.circuit,
			startedAt: row.startedAt,
			correction,
			reason,
			by: actor.personId,
			byName: actor.name
		});
		const before = { outcome: row.record.outcome, kind: row.record.trip?.kind, attended: row.record.attended };
		await recordAudit(tx, actor, { action: 'corrected', subject: 'start', subjectId: startId, before, after: input });
		return row.unitId;
	});
	await runAnalysis({ organisationId, unitId });
	return withOrganisation(organisationId, async (tx) => {
		const { row } = await visibleStart(tx, actor, startId);
		return startShape(row, await listCorrections(tx, unitId), system);
	});
}
