import { AppError } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import type { Unit } from '$lib/model/wire/site-unit';
import { demand } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { enqueueAnalysis } from '$lib/server/jobs/queue';
import { recordAudit } from '$lib/server/repositories/audit';
import { findRemembered, remember } from '$lib/server/repositories/logs';
import { insertLimits, listLimits, raiseRevision, retireLimit, updateUnit } from '$lib/server/repositories/plant';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { LIMIT_KEYS } from '$lib/model/unit';
import { unitOf, visibleUnit } from './units';

/** A unit set up like its twin: nature, limits and, between sites, the mappings people confirmed. */

export type TwinParts = { nature: boolean; limits: boolean; mapping: boolean };

/** Copies parts of one unit's set-up to another. What the other had is replaced, and stays in the limits' history. */
export async function copyToTwin(actor: Actor, fromId: string, toId: string, parts: TwinParts): Promise<Unit> {
	demand(actor, 'plant');
	if (fromId === toId) throw new AppError('invalid', 'A unit is no twin of itself.');
	const { organisationId } = actor;
	await withOrganisation(organisationId, async (tx) => {
		const from = await visibleUnit(tx, actor, fromId);
		const to = await visibleUnit(tx, actor, toId);
		if (parts.nature) await updateUnit(tx, toId, { nature: from.unit.nature });
		if (parts.limits) {
			const limits = await listLimits(tx, [fromId]);
			for (const key of LIMIT_KEYS) await retireLimit(tx, toId, key, now());
			await insertLimits(
				tx,
				limits.map(({ key, value, provenance, validFrom, note }) => ({
					organisationId,
					unitId: toId,
					key,
					value,
					provenance,
					validFrom,
					note: note ?? `as ${from.unit.tag}`,
					setBy: actor.via === 'system' ? null : actor.personId
				}))
			);
		}
		// A site remembers its headers for all of its units; another site learns them with the twin's name in place.
		if (parts.mapping && from.site.id !== to.site.id) {
			const rows = await findRemembered(tx, from.site.id);
			const known = new Set(rows.filter((row) => row.siteId === to.site.id).map((row) => row.signature));
			for (const row of rows.filter(({ siteId }) => siteId === from.site.id)) {
				const text = JSON.stringify(row.mapping);
				if (known.has(row.signature) || !text.includes(fromId)) continue;
				const mapping: unknown = JSON.parse(text.replaceAll(fromId, toId));
				await remember(tx, { ...row, siteId: to.site.id, mapping });
			}
		}
		await raiseRevision(tx, toId);
		await recordAudit(tx, actor, {
			action: 'set up as a twin',
			subject: 'unit',
			subjectId: toId,
			after: { from: fromId, ...parts }
		});
	});
	await enqueueAnalysis({ organisationId, unitId: toId });
	return unitOf(actor, toId);
}
