import { database } from '$lib/server/db/client';
import { tokens } from '$lib/server/db/schema/identity';
import { and, desc, eq, gt, inArray, isNull, sql } from 'drizzle-orm';

/** Single-use tokens: invitations, resets, changes of address, the first visit's code. Only their hashes are kept. */

export type TokenRow = typeof tokens.$inferSelect;
type Kind = TokenRow['kind'];

/** Keeps a token's hash. */
export async function insertToken(row: typeof tokens.$inferInsert): Promise<void> {
	await database().insert(tokens).values(row);
}

/** A token that is unused and has not expired. */
export async function findToken(tokenHash: string, kind: Kind, now: Date): Promise<TokenRow | null> {
	const [row] = await database()
		.select()
		.from(tokens)
		.where(
			and(eq(tokens.tokenHash, tokenHash), eq(tokens.kind, kind), isNull(tokens.usedAt), gt(tokens.expiresAt, now))
		);
	return row ?? null;
}

/** Uses a token up: true for the one call that does. */
export async function useToken(tokenHash: string, at: Date): Promise<boolean> {
	const rows = await database()
		.update(tokens)
		.set({ usedAt: at })
		.where(and(eq(tokens.tokenHash, tokenHash), isNull(tokens.usedAt), gt(tokens.expiresAt, at)))
		.returning({ kind: tokens.kind });
	return rows.length > 0;
}

/** Ends a person's open tokens of some kinds. */
export async function endTokensOf(personId: string, kinds: Kind[], at: Date): Promise<void> {
	await database()
		.update(tokens)
		.set({ usedAt: at })
		.where(and(eq(tokens.personId, personId), inArray(tokens.kind, kinds), isNull(tokens.usedAt)));
}

/** Invitations of an office that nobody took yet, newest first. */
export async function listInvitations(organisationId: string, now: Date): Promise<TokenRow[]> {
	return database()
		.select()
		.from(tokens)
		.where(
			and(
				eq(tokens.organisationId, organisationId),
				eq(tokens.kind, 'invitation'),
				isNull(tokens.usedAt),
				gt(tokens.expiresAt, now)
			)
		)
		.orderBy(desc(tokens.createdAt));
}

/** Ends an office's open invitations to an address; gives how many. */
export async function endInvitations(organisationId: string, email: string, at: Date): Promise<number> {
	const rows = await database()
		.update(tokens)
		.set({ usedAt: at })
		.where(
			and(
				eq(tokens.organisationId, organisationId),
				eq(tokens.kind, 'invitation'),
				isNull(tokens.usedAt),
				gt(tokens.expiresAt, at),
				sql`${tokens.data}->>'email' = ${email}`
			)
		)
		.returning({ kind: tokens.kind });
	return rows.length;
}
