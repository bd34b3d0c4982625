import { AppError, notFound } from '$lib/model/errors';
import { maySeeSite, type Actor } from '$lib/model/people';
import type { siteInputSchema, Site } from '$lib/model/wire/site-unit';
import { demand, demandSite } from '$lib/server/auth/guard';
import { recordAudit } from '$lib/server/repositories/audit';
import { deleteSite, findSite, insertSite, listSites, listUnits, updateSite } from '$lib/server/repositories/plant';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import type { z } from 'zod';
import { siteShape } from './plant-shapes';

type SiteInput = z.output<typeof siteInputSchema>;

/** The sites a person may know of, by name. */
export async function sitesOf(actor: Actor): Promise<Site[]> {
	const rows = await withOrganisation(actor.organisationId, listSites);
	return rows.filter((row) => maySeeSite(actor, row.id)).map(siteShape);
}

/** One site. @throws AppError `not-found` */
export async function siteOf(actor: Actor, id: string): Promise<Site> {
	demandSite(actor, id, 'site');
	const row = await withOrganisation(actor.organisationId, (tx) => findSite(tx, id));
	if (!row) throw notFound('site');
	return siteShape(row);
}

async function nameIsFree(tx: Tx, name: string, except?: string): Promise<void> {
	const taken = (await listSites(tx)).find((site) => site.name === name && site.id !== except);
	if (taken)
		throw new AppError('conflict', `There is a site “${name}” already.`, { location: `/api/sites/${taken.id}` });
}

/** Adds a site. @throws AppError `conflict` when the name is taken */
export async function addSite(actor: Actor, input: SiteInput): Promise<Site> {
	demand(actor, 'plant');
	if (actor.siteIds !== null) throw new AppError('forbidden', 'Who may see some sites only may not add one.');
	return withOrganisation(actor.organisationId, async (tx) => {
		await nameIsFree(tx, input.name);
		const row = await insertSite(tx, { ...input, organisationId: actor.organisationId });
		await recordAudit(tx, actor, { action: 'added', subject: 'site', subjectId: row.id, after: input });
		return siteShape(row);
	});
}

/** Changes a site. */
export async function changeSite(actor: Actor, id: string, change: Partial<SiteInput>): Promise<Site> {
	demand(actor, 'plant');
	demandSite(actor, id, 'site');
	return withOrganisation(actor.organisationId, async (tx) => {
		const before = await findSite(tx, id);
		if (!before) throw notFound('site');
		if (change.name) await nameIsFree(tx, change.name, id);
		if (Object.keys(change).length > 0) await updateSite(tx, id, change);
		await recordAudit(tx, actor, {
			action: 'changed',
			subject: 'site',
			subjectId: id,
			before: siteShape(before),
			after: change
		});
		return siteShape({ ...before, ...change } as typeof before);
	});
}

/** Removes a site that has no units. @throws AppError `conflict` when it has */
export async function removeSite(actor: Actor, id: string): Promise<void> {
	demand(actor, 'plant');
	demandSite(actor, id, 'site');
	await withOrganisation(actor.organisationId, async (tx) => {
		const before = await findSite(tx, id);
		if (!before) throw notFound('site');
		const units = await listUnits(tx, id);
		if (units.length > 0)
			throw new AppError('conflict', `The site still has ${units.length} units. Remove them first.`);
		await deleteSite(tx, id);
		await recordAudit(tx, actor, { action: 'removed', subject: 'site', subjectId: id, before: siteShape(before) });
	});
}
