import type { Actor } from '$lib/model/people';
import type { Tx } from '$lib/server/db/client';
import { audit } from '$lib/server/db/schema/circle';
import { desc, lt } from 'drizzle-orm';

export type AuditRow = typeof audit.$inferSelect;

/** Writes one line of the audit trail. */
export async function recordAudit(
	tx: Tx,
	actor: Actor,
	entry: { action: string; subject: string; subjectId?: string; before?: unknown; after?: unknown }
): Promise<void> {
	await tx.insert(audit).values({
		organisationId: actor.organisationId,
		by: actor.via === 'system' ? null : actor.personId,
		byName: actor.name,
		...entry
	});
}

/** The newest lines, before a line's id when given. */
export function listAudit(tx: Tx, limit: number, before?: number): Promise<AuditRow[]> {
	return tx
		.select()
		.from(audit)
		.where(before === undefined ? undefined : lt(audit.id, before))
		.orderBy(desc(audit.id))
		.limit(limit);
}
