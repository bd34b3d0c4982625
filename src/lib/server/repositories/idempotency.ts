import type { Tx } from '$lib/server/db/client';
import { idempotency } from '$lib/server/db/schema/circle';
import { and, eq, gt, lt, sql } from 'drizzle-orm';

export type KeptAnswer = { key: string; request: string; status: number; body: unknown; location: string | null };

export async function findAnswer(tx: Tx, key: string): Promise<KeptAnswer | null> {
	const fresh = gt(idempotency.createdAt, sql`now() - interval '1 day'`);
	const [row] = await tx
		.select()
		.from(idempotency)
		.where(and(eq(idempotency.key, key), fresh));
	return row ?? null;
}

/** Keeps an answer, and drops those older than a day. */
export async function keepAnswer(tx: Tx, organisationId: string, answer: KeptAnswer): Promise<void> {
	await tx.delete(idempotency).where(lt(idempotency.createdAt, sql`now() - interval '1 day'`));
	await tx
		.insert(idempotency)
		.values({ ...answer, organisationId })
		.onConflictDoNothing();
}
