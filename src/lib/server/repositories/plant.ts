import type { LimitKey, Provenance, UnitNature } from '$lib/model/unit';
import type { Tx } from '$lib/server/db/client';
import { sites, unitLimits, units } from '$lib/server/db/schema/plant';
import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';

/** Sites, units and limits of the transaction's organisation. */

export type SiteRow = typeof sites.$inferSelect;
export type UnitRow = typeof units.$inferSelect;
export type LimitRow = typeof unitLimits.$inferSelect;

export const listSites = (tx: Tx): Promise<SiteRow[]> => tx.select().from(sites).orderBy(asc(sites.name));

export async function findSite(tx: Tx, id: string): Promise<SiteRow | null> {
	const [row] = await tx.select().from(sites).where(eq(sites.id, id));
	return row ?? null;
}

export async function insertSite(tx: Tx, row: typeof sites.$inferInsert): Promise<SiteRow> {
	const [stored] = await tx.insert(sites).values(row).returning();
	if (!stored) throw new Error('the site was not stored');
	return stored;
}

export async function updateSite(tx: Tx, id: string, change: Partial<typeof sites.$inferInsert>): Promise<void> {
	await tx.update(sites).set(change).where(eq(sites.id, id));
}

export async function deleteSite(tx: Tx, id: string): Promise<void> {
	await tx.delete(sites).where(eq(sites.id, id));
}

export function listUnits(tx: Tx, siteId?: string): Promise<UnitRow[]> {
	return tx
		.select()
		.from(units)
		.where(siteId ? eq(units.siteId, siteId) : undefined)
		.orderBy(asc(units.tag), asc(units.id));
}

export async function findUnit(tx: Tx, id: string): Promise<UnitRow | null> {
	const [row] = await tx.select().from(units).where(eq(units.id, id));
	return row ?? null;
}

export async function insertUnit(tx: Tx, row: typeof units.$inferInsert): Promise<UnitRow> {
	const [stored] = await tx.insert(units).values(row).returning();
	if (!stored) throw new Error('the unit was not stored');
	return stored;
}

export async function updateUnit(
	tx: Tx,
	id: string,
	change: Partial<
		Pick<UnitRow, 'tag' | 'refrigerant' | 'circuits' | 'namePlate' | 'deliveryHours'> & { nature: UnitNature }
	>
): Promise<void> {
	if (Object.keys(change).length > 0) await tx.update(units).set(change).where(eq(units.id, id));
}

/** Notes that a late delivery was told. */
export async function markLateTold(tx: Tx, unitId: string, at: Date): Promise<void> {
	await tx.update(units).set({ lateToldAt: at }).where(eq(units.id, unitId));
}

/** Marks everything computed for a unit as stale. */
export async function raiseRevision(tx: Tx, unitId: string): Promise<void> {
	await tx
		.update(units)
		.set({ revision: sql`${units.revision} + 1` })
		.where(eq(units.id, unitId));
}

export async function deleteUnit(tx: Tx, id: string): Promise<void> {
	await tx.delete(units).where(eq(units.id, id));
}

/** The limits in force or planned of some units (retired values left out), oldest first. */
export function listLimits(tx: Tx, unitIds: readonly string[]): Promise<LimitRow[]> {
	if (unitIds.length === 0) return Promise.resolve([]);
	return tx
		.select()
		.from(unitLimits)
		.where(and(inArray(unitLimits.unitId, [...unitIds]), isNull(unitLimits.retiredAt)))
		.orderBy(sql`${unitLimits.validFrom} asc nulls first`, asc(unitLimits.setAt));
}

export async function retireLimit(tx: Tx, unitId: string, key: LimitKey, at: Date): Promise<void> {
	await tx
		.update(unitLimits)
		.set({ retiredAt: at })
		.where(and(eq(unitLimits.unitId, unitId), eq(unitLimits.key, key), isNull(unitLimits.retiredAt)));
}

export type NewLimit = {
	organisationId: string;
	unitId: string;
	key: LimitKey;
	value: number;
	provenance: Provenance;
	validFrom: Date | null;
	note: string | null;
	setBy: string | null;
};

export async function insertLimits(tx: Tx, rows: NewLimit[]): Promise<void> {
	if (rows.length > 0) await tx.insert(unitLimits).values(rows);
}
