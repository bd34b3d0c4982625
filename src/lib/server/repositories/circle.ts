import type { Interval } from '$lib/model/series';
import type { Tx } from '$lib/server/db/client';
import { cases, changes, checks, visits, type TimelineEntry } from '$lib/server/db/schema/circle';
import { and, asc, desc, eq, inArray, isNotNull, sql } from 'drizzle-orm';

/** Cases, visits, checks and changes of the transaction's organisation. */

export type CaseRow = typeof cases.$inferSelect;
export type VisitRow = typeof visits.$inferSelect;
export type CheckRow = typeof checks.$inferSelect;
export type ChangeRow = typeof changes.$inferSelect;

/** Stretches with a person at the unit: from arrival to leaving, half a day when leaving was not noted. */
export async function listVisitSpans(tx: Tx, unitId: string): Promise<Interval[]> {
	const rows = await tx
		.select({ from: visits.arrivedAt, to: visits.leftAt })
		.from(visits)
		.where(and(eq(visits.unitId, unitId), isNotNull(visits.arrivedAt)));
	return rows.flatMap(({ from, to }) =>
		from ? [{ from: from.getTime(), to: to?.getTime() ?? from.getTime() + 12 * 3_600_000 }] : []
	);
}

export function listChecks(tx: Tx, unitId: string): Promise<CheckRow[]> {
	return tx.select().from(checks).where(eq(checks.unitId, unitId)).orderBy(asc(checks.at));
}

/** Checks of some units, newest first. */
export function listChecksOfUnits(tx: Tx, unitIds: readonly string[]): Promise<CheckRow[]> {
	if (unitIds.length === 0) return Promise.resolve([]);
	return tx
		.select()
		.from(checks)
		.where(inArray(checks.unitId, [...unitIds]))
		.orderBy(desc(checks.at));
}

export async function findCheck(tx: Tx, id: string): Promise<CheckRow | null> {
	const [row] = await tx.select().from(checks).where(eq(checks.id, id));
	return row ?? null;
}

export async function findCheckByClientKey(tx: Tx, clientKey: string): Promise<CheckRow | null> {
	const [row] = await tx.select().from(checks).where(eq(checks.clientKey, clientKey));
	return row ?? null;
}

/** Stores a check once: a second one with the same client key gives the first back. */
export async function insertCheck(
	tx: Tx,
	row: typeof checks.$inferInsert
): Promise<{ row: CheckRow; repeated: boolean }> {
	const [stored] = await tx.insert(checks).values(row).onConflictDoNothing().returning();
	if (stored) return { row: stored, repeated: false };
	const [first] = await tx
		.select()
		.from(checks)
		.where(eq(checks.clientKey, row.clientKey ?? ''));
	if (!first) throw new Error('the check was not stored');
	return { row: first, repeated: true };
}

export async function updateCheck(tx: Tx, id: string, change: Partial<typeof checks.$inferInsert>): Promise<void> {
	await tx.update(checks).set(change).where(eq(checks.id, id));
}

/** Suspects that a signed check settles, by unit: what a client may see. */
export function listSignedSuspects(tx: Tx, unitIds: readonly string[]) {
	if (unitIds.length === 0) return Promise.resolve([]);
	return tx
		.select({ unitId: checks.unitId, suspect: checks.suspect })
		.from(checks)
		.where(and(inArray(checks.unitId, [...unitIds]), isNotNull(checks.signedAt), isNotNull(checks.suspect)));
}

export function listChanges(tx: Tx, unitId: string): Promise<ChangeRow[]> {
	return tx.select().from(changes).where(eq(changes.unitId, unitId)).orderBy(asc(changes.at));
}

/** Changes of some units, newest first. */
export function listChangesOfUnits(tx: Tx, unitIds: readonly string[]): Promise<ChangeRow[]> {
	if (unitIds.length === 0) return Promise.resolve([]);
	return tx
		.select()
		.from(changes)
		.where(inArray(changes.unitId, [...unitIds]))
		.orderBy(desc(changes.at));
}

export async function insertChange(
	tx: Tx,
	row: typeof changes.$inferInsert
): Promise<{ row: ChangeRow; repeated: boolean }> {
	const [stored] = await tx.insert(changes).values(row).onConflictDoNothing().returning();
	if (stored) return { row: stored, repeated: false };
	const [first] = await tx
		.select()
		.from(changes)
		.where(eq(changes.clientKey, row.clientKey ?? ''));
	if (!first) throw new Error('the change was not stored');
	return { row: first, repeated: true };
}

export async function findCase(tx: Tx, id: string): Promise<CaseRow | null> {
	const [row] = await tx.select().from(cases).where(eq(cases.id, id));
	return row ?? null;
}

/** Cases, newest first; of some units only when given. */
export function listCases(tx: Tx, unitIds: readonly string[]): Promise<CaseRow[]> {
	if (unitIds.length === 0) return Promise.resolve([]);
	return tx
		.select()
		.from(cases)
		.where(inArray(cases.unitId, [...unitIds]))
		.orderBy(desc(cases.openedAt));
}

/** Opens a case with the organisation's next number. */
export async function insertCase(tx: Tx, row: Omit<typeof cases.$inferInsert, 'number'>): Promise<CaseRow> {
	const [last] = await tx.select({ most: sql<number>`coalesce(max(${cases.number}), 0)` }).from(cases);
	const [stored] = await tx
		.insert(cases)
		.values({ ...row, number: Number(last?.most ?? 0) + 1 })
		.returning();
	if (!stored) throw new Error('the case was not stored');
	return stored;
}

export async function updateCase(tx: Tx, id: string, change: Partial<typeof cases.$inferInsert>): Promise<void> {
	await tx.update(cases).set(change).where(eq(cases.id, id));
}

/** Adds lines to a case's timeline. */
export async function appendTimeline(tx: Tx, id: string, entries: readonly TimelineEntry[]): Promise<void> {
	if (entries.length === 0) return;
	await tx
		.update(cases)
		.set({ timeline: sql`${cases.timeline} || ${JSON.stringify(entries)}::jsonb` })
		.where(eq(cases.id, id));
}

export async function findVisit(tx: Tx, id: string): Promise<VisitRow | null> {
	const [row] = await tx.select().from(visits).where(eq(visits.id, id));
	return row ?? null;
}

/** Visits by date; of some units only when given. */
export function listVisits(tx: Tx, unitIds: readonly string[]): Promise<VisitRow[]> {
	if (unitIds.length === 0) return Promise.resolve([]);
	return tx
		.select()
		.from(visits)
		.where(inArray(visits.unitId, [...unitIds]))
		.orderBy(asc(visits.date), asc(visits.beThereBy));
}

export async function insertVisit(tx: Tx, row: typeof visits.$inferInsert): Promise<VisitRow> {
	const [stored] = await tx.insert(visits).values(row).returning();
	if (!stored) throw new Error('the visit was not stored');
	return stored;
}

export async function updateVisit(tx: Tx, id: string, change: Partial<typeof visits.$inferInsert>): Promise<void> {
	await tx.update(visits).set(change).where(eq(visits.id, id));
}

export async function deleteVisit(tx: Tx, id: string): Promise<void> {
	await tx.delete(visits).where(eq(visits.id, id));
}
