import { AppError, notFound } from '$lib/model/errors';
import { maySeeSite, type Actor } from '$lib/model/people';
import { LIMIT_KEYS, type LimitKey } from '$lib/model/unit';
import type { LimitsInput, Unit, unitInputSchema, unitPatchSchema } from '$lib/model/wire/site-unit';
import { demand, demandSite } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { enqueueAnalysis } from '$lib/server/jobs/queue';
import { recordAudit } from '$lib/server/repositories/audit';
import {
	deleteUnit,
	findSite,
	findUnit,
	insertLimits,
	insertUnit,
	listLimits,
	listUnits,
	raiseRevision,
	retireLimit,
	updateUnit,
	type NewLimit,
	type SiteRow,
	type UnitRow
} from '$lib/server/repositories/plant';
import { listLogs } from '$lib/server/repositories/logs';
import { listPhotos } from '$lib/server/repositories/photos';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { listPartKeys } from '$lib/server/repositories/uploads';
import { objectStore } from '$lib/server/store';
import type { z } from 'zod';
import { unitShape } from './plant-shapes';

type UnitInput = z.output<typeof unitInputSchema>;
type UnitPatch = z.output<typeof unitPatchSchema>;

/** A unit and its site, when this person may know of them. @throws AppError `not-found` */
export async function visibleUnit(tx: Tx, actor: Actor, unitId: string): Promise<{ unit: UnitRow; site: SiteRow }> {
	const unit = await findUnit(tx, unitId);
	if (!unit || !maySeeSite(actor, unit.siteId)) throw notFound('unit');
	const site = await findSite(tx, unit.siteId);
	if (!site) throw notFound('unit');
	return { unit, site };
}

/** The units a person may know of, of one site when given. */
export async function unitsOf(actor: Actor, siteId?: string): Promise<Unit[]> {
	if (siteId) demandSite(actor, siteId, 'site');
	return withOrganisation(actor.organisationId, async (tx) => {
		const rows = (await listUnits(tx, siteId)).filter((row) => maySeeSite(actor, row.siteId));
		const limits = await listLimits(
			tx,
			rows.map((row) => row.id)
		);
		return rows.map((row) => unitShape(row, limits));
	});
}

/** One unit. @throws AppError `not-found` */
export async function unitOf(actor: Actor, id: string): Promise<Unit> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { unit } = await visibleUnit(tx, actor, id);
		return unitShape(unit, await listLimits(tx, [id]));
	});
}

function limitRows(actor: Actor, unitId: string, limits: LimitsInput): { retired: LimitKey[]; added: NewLimit[] } {
	const retired: LimitKey[] = [];
	const added: NewLimit[] = [];
	for (const key of LIMIT_KEYS) {
		const input = limits[key];
		if (input === undefined) continue;
		retired.push(key);
		const values =
			input === null
				? []
				: Array.isArray(input)
					? input
					: [typeof input === 'number' ? { value: input, provenance: 'given' as const } : input];
		for (const entry of values) {
			added.push({
				organisationId: actor.organisationId,
				unitId,
				key,
				value: entry.value,
				provenance: entry.provenance,
				validFrom: 'validFrom' in entry && entry.validFrom ? new Date(entry.validFrom) : null,
				note: 'note' in entry ? (entry.note ?? null) : null,
				setBy: actor.via === 'system' ? null : actor.personId
			});
		}
	}
	return { retired, added };
}

/**
 * Sets limits. A value with a `validFrom` later than the present one joins it; any other replaces what was there.
 */
async function setLimits(tx: Tx, actor: Actor, unitId: string, limits: LimitsInput): Promise<void> {
	const { retired, added } = limitRows(actor, unitId, limits);
	const joins = new Set(
		added.filter((row) => row.validFrom !== null && !Array.isArray(limits[row.key])).map((row) => row.key)
	);
	for (const key of retired) if (!joins.has(key)) await retireLimit(tx, unitId, key, now());
	await insertLimits(tx, added);
}

async function tagIsFree(tx: Tx, siteId: string, tag: string, except?: string): Promise<void> {
	const taken = (await listUnits(tx, siteId)).find((unit) => unit.tag === tag && unit.id !== except);
	if (taken)
		throw new AppError('conflict', `The site has a unit “${tag}” already.`, { location: `/api/units/${taken.id}` });
}

/** Adds a unit to a site. @throws AppError `conflict` when its tag is taken there */
export async function addUnit(actor: Actor, input: UnitInput): Promise<Unit> {
	demand(actor, 'plant');
	demandSite(actor, input.siteId, 'site');
	return withOrganisation(actor.organisationId, async (tx) => {
		if (!(await findSite(tx, input.siteId))) throw notFound('site');
		await tagIsFree(tx, input.siteId, input.tag);
		const { limits, ...fields } = input;
		const row = await insertUnit(tx, { ...fields, organisationId: actor.organisationId });
		await setLimits(tx, actor, row.id, limits);
		await recordAudit(tx, actor, { action: 'added', subject: 'unit', subjectId: row.id, after: input });
		return unitShape(row, await listLimits(tx, [row.id]));
	});
}

/** Changes a unit; a change of nature, circuits, refrigerant or limits recomputes its starts. */
export async function changeUnit(actor: Actor, id: string, change: UnitPatch): Promise<Unit> {
	demand(actor, 'plant');
	const unit = await withOrganisation(actor.organisationId, async (tx) => {
		const before = await visibleUnit(tx, actor, id);
		const shapeBefore = unitShape(before.unit, await listLimits(tx, [id]));
		if (change.tag) await tagIsFree(tx, before.unit.siteId, change.tag, id);
		const { limits, nature, ...fields } = change;
		await updateUnit(tx, id, { ...fields, ...(nature ? { nature: { ...before.unit.nature, ...nature } } : {}) });
		if (limits) await setLimits(tx, actor, id, limits);
		await raiseRevision(tx, id);
		await recordAudit(tx, actor, {
			action: 'changed',
			subject: 'unit',
			subjectId: id,
			before: shapeBefore,
			after: change
		});
		const { unit: row } = await visibleUnit(tx, actor, id);
		return unitShape(row, await listLimits(tx, [id]));
	});
	const matters = change.limits ?? change.nature ?? change.refrigerant ?? change.circuits;
	if (matters !== undefined) await enqueueAnalysis({ organisationId: actor.organisationId, unitId: id });
	return unit;
}

/** Removes a unit with its logs and all that was computed from them. */
export async function removeUnit(actor: Actor, id: string): Promise<void> {
	demand(actor, 'plant');
	const keys = await withOrganisation(actor.organisationId, async (tx) => {
		const { unit } = await visibleUnit(tx, actor, id);
		const kept = (await listLogs(tx, id)).flatMap((log) => log.files.map((file) => file.key));
		kept.push(...(await listPhotos(tx, id)).flatMap((photo) => [photo.originalKey, photo.viewKey]));
		kept.push(...(await listPartKeys(tx, id)));
		await deleteUnit(tx, id);
		await recordAudit(tx, actor, { action: 'removed', subject: 'unit', subjectId: id, before: unit });
		return kept;
	});
	// Only once the rows are gone for good: a file too many does less harm than a row without its file.
	for (const key of keys) await objectStore().remove(key);
}
