import { narrowerRole, sharedSites, type Actor, type Preferences, type Role, type Scope } from '$lib/model/people';
import { database } from '$lib/server/db/client';
import { apiKeys, members, organisations, people, sessions } from '$lib/server/db/schema/identity';
import { and, asc, count, desc, eq, gt, isNull, lt, ne, or, sql } from 'drizzle-orm';

/** People, members, sessions and keys: what is read before an organisation is known. */

export type PersonRow = typeof people.$inferSelect;

export async function findPersonByEmail(email: string): Promise<PersonRow | null> {
	const [row] = await database().select().from(people).where(eq(people.email, email.trim().toLowerCase()));
	return row ?? null;
}

export async function findPerson(id: string): Promise<PersonRow | null> {
	const [row] = await database().select().from(people).where(eq(people.id, id));
	return row ?? null;
}

export async function insertPerson(person: {
	email: string;
	name: string;
	passwordHash: string | null;
}): Promise<PersonRow> {
	const [row] = await database()
		.insert(people)
		.values({ ...person, email: person.email.trim().toLowerCase() })
		.returning();
	if (!row) throw new Error('the person was not stored');
	return row;
}

export async function updatePerson(id: string, change: Partial<typeof people.$inferInsert>): Promise<void> {
	await database().update(people).set(change).where(eq(people.id, id));
}

export async function savePreferences(id: string, preferences: Preferences): Promise<void> {
	await updatePerson(id, { preferences });
}

export async function insertOrganisation(name: string): Promise<string> {
	const [row] = await database().insert(organisations).values({ name }).returning({ id: organisations.id });
	if (!row) throw new Error('the organisation was not stored');
	return row.id;
}

export async function findOrganisation(
	id: string
): Promise<{ id: string; name: string; settings: Record<string, unknown> } | null> {
	const [row] = await database().select().from(organisations).where(eq(organisations.id, id));
	return row ?? null;
}

export async function listOrganisations(): Promise<{ id: string; name: string }[]> {
	return database()
		.select({ id: organisations.id, name: organisations.name })
		.from(organisations)
		.orderBy(asc(organisations.createdAt));
}

export async function countOrganisations(): Promise<number> {
	const [row] = await database().select({ n: count() }).from(organisations);
	return row?.n ?? 0;
}

export async function saveSettings(id: string, settings: Record<string, unknown>): Promise<void> {
	await database().update(organisations).set({ settings }).where(eq(organisations.id, id));
}

export async function insertMember(member: {
	organisationId: string;
	personId: string;
	role: Role;
	siteIds: string[] | null;
}): Promise<void> {
	await database()
		.insert(members)
		.values(member)
		.onConflictDoUpdate({
			target: [members.organisationId, members.personId],
			set: { role: member.role, siteIds: member.siteIds, leftAt: null }
		});
}

export async function updateMember(
	organisationId: string,
	personId: string,
	change: Partial<{ role: Role; siteIds: string[] | null; leftAt: Date | null }>
): Promise<void> {
	await database()
		.update(members)
		.set(change)
		.where(and(eq(members.organisationId, organisationId), eq(members.personId, personId)));
}

export type MemberRow = {
	personId: string;
	name: string;
	email: string;
	role: Role;
	siteIds: string[] | null;
	leftAt: Date | null;
	createdAt: Date;
};

const memberColumns = {
	personId: members.personId,
	name: people.name,
	email: people.email,
	role: members.role,
	siteIds: members.siteIds,
	leftAt: members.leftAt,
	createdAt: members.createdAt
};

export async function listMembers(organisationId: string): Promise<MemberRow[]> {
	return database()
		.select(memberColumns)
		.from(members)
		.innerJoin(people, eq(people.id, members.personId))
		.where(eq(members.organisationId, organisationId))
		.orderBy(asc(people.name));
}

/** A person's present memberships, oldest first. */
export async function membershipsOf(
	personId: string
): Promise<{ organisationId: string; role: Role; siteIds: string[] | null }[]> {
	return database()
		.select({ organisationId: members.organisationId, role: members.role, siteIds: members.siteIds })
		.from(members)
		.where(and(eq(members.personId, personId), isNull(members.leftAt)))
		.orderBy(asc(members.createdAt));
}

export type SessionRow = typeof sessions.$inferSelect;

export async function insertSession(row: typeof sessions.$inferInsert): Promise<void> {
	await database().insert(sessions).values(row);
}

export type SessionActor = {
	actor: Actor;
	preferences: Preferences;
	expiresAt: Date;
	seenAt: Date;
	/** the office asks its owners for two-step sign-in, and this one has not set it up */
	twoStepDue: boolean;
};

/** The member behind a session's token hash, while the session lives and the member has not left. */
export async function findSessionActor(tokenHash: string, now: Date): Promise<SessionActor | null> {
	const [row] = await database()
		.select({
			session: sessions,
			person: people,
			role: members.role,
			siteIds: members.siteIds,
			settings: organisations.settings
		})
		.from(sessions)
		.innerJoin(people, eq(people.id, sessions.personId))
		.innerJoin(organisations, eq(organisations.id, sessions.organisationId))
		.innerJoin(
			members,
			and(eq(members.personId, sessions.personId), eq(members.organisationId, sessions.organisationId))
		)
		.where(and(eq(sessions.tokenHash, tokenHash), gt(sessions.expiresAt, now), isNull(members.leftAt)));
	if (!row) return null;
	const { session, person, role, siteIds, settings } = row;
	return {
		actor: {
			organisationId: session.organisationId,
			personId: person.id,
			name: person.name,
			email: person.email,
			role,
			siteIds,
			via: 'session',
			scopes: null
		},
		preferences: person.preferences,
		expiresAt: session.expiresAt,
		seenAt: session.seenAt,
		twoStepDue: role === 'owner' && settings['requireTwoStep'] === true && !person.totpConfirmed
	};
}

/** Moves a session to another office of its person. */
export async function moveSession(tokenHash: string, organisationId: string): Promise<void> {
	await database().update(sessions).set({ organisationId }).where(eq(sessions.tokenHash, tokenHash));
}

export async function touchSession(tokenHash: string, seenAt: Date, expiresAt: Date): Promise<void> {
	await database().update(sessions).set({ seenAt, expiresAt }).where(eq(sessions.tokenHash, tokenHash));
}

export async function deleteSession(tokenHash: string): Promise<void> {
	await database().delete(sessions).where(eq(sessions.tokenHash, tokenHash));
}

export async function deleteSessionsOf(personId: string): Promise<void> {
	await database().delete(sessions).where(eq(sessions.personId, personId));
}

export async function listSessions(personId: string): Promise<SessionRow[]> {
	return database().select().from(sessions).where(eq(sessions.personId, personId)).orderBy(desc(sessions.seenAt));
}

export type ApiKeyRow = Omit<typeof apiKeys.$inferSelect, 'keyHash'>;

export async function insertApiKey(row: typeof apiKeys.$inferInsert): Promise<string> {
	const [stored] = await database().insert(apiKeys).values(row).returning({ id: apiKeys.id });
	if (!stored) throw new Error('the key was not stored');
	return stored.id;
}

/** The member behind a key's hash, while the key lives and the member has not left. */
export async function findKeyActor(
	keyHash: string,
	now: Date
): Promise<{ keyId: string; usedAt: Date | null; actor: Actor; preferences: Preferences } | null> {
	const [row] = await database()
		.select({ key: apiKeys, person: people, member: { role: members.role, siteIds: members.siteIds } })
		.from(apiKeys)
		.innerJoin(people, eq(people.id, apiKeys.personId))
		.innerJoin(members, and(eq(members.personId, apiKeys.personId), eq(members.organisationId, apiKeys.organisationId)))
		.where(and(eq(apiKeys.keyHash, keyHash), isNull(apiKeys.revokedAt), isNull(members.leftAt)));
	if (!row || (row.key.expiresAt && row.key.expiresAt <= now)) return null;
	const { key, person, member } = row;
	const actor: Actor = {
		organisationId: key.organisationId,
		personId: person.id,
		name: person.name,
		email: person.email,
		// A key never does more than its member may now, whatever they might when it was made.
		role: narrowerRole(key.role, member.role),
		siteIds: sharedSites(key.siteIds, member.siteIds),
		via: 'key',
		scopes: key.scopes as Scope[]
	};
	return { keyId: key.id, usedAt: key.usedAt, actor, preferences: { units: 'si', paper: 'system' } };
}

export async function touchApiKey(id: string, usedAt: Date): Promise<void> {
	await database().update(apiKeys).set({ usedAt }).where(eq(apiKeys.id, id));
}

export async function listApiKeys(organisationId: string): Promise<(ApiKeyRow & { personName: string })[]> {
	const rows = await database()
		.select({ key: apiKeys, personName: people.name })
		.from(apiKeys)
		.innerJoin(people, eq(people.id, apiKeys.personId))
		.where(eq(apiKeys.organisationId, organisationId))
		.orderBy(desc(apiKeys.createdAt));
	return rows.map(({ key: { keyHash: _hash, ...key }, personName }) => ({ ...key, personName }));
}

export async function revokeApiKey(organisationId: string, id: string, at: Date): Promise<boolean> {
	const rows = await database()
		.update(apiKeys)
		.set({ revokedAt: at })
		.where(and(eq(apiKeys.organisationId, organisationId), eq(apiKeys.id, id), isNull(apiKeys.revokedAt)))
		.returning({ id: apiKeys.id });
	return rows.length > 0;
}

/** Uses a time step of the second step up: true for the one call that does. */
export async function takeTotpStep(id: string, step: number): Promise<boolean> {
	const rows = await database()
		.update(people)
		.set({ totpLastStep: step })
		.where(and(eq(people.id, id), or(isNull(people.totpLastStep), lt(people.totpLastStep, step))))
		.returning({ id: people.id });
	return rows.length > 0;
}

/** Uses a recovery code up by its hash: true for the one call that does. */
export async function takeRecoveryHash(id: string, hash: string): Promise<boolean> {
	const rows = await database()
		.update(people)
		.set({ recoveryHashes: sql`${people.recoveryHashes} - ${hash}::text` })
		.where(and(eq(people.id, id), sql`jsonb_exists(${people.recoveryHashes}, ${hash})`))
		.returning({ id: people.id });
	return rows.length > 0;
}

export async function findPersonBySubject(subject: string): Promise<PersonRow | null> {
	const [row] = await database().select().from(people).where(eq(people.oidcSubject, subject));
	return row ?? null;
}

/** Ends a person's sessions but one. */
export async function deleteOtherSessions(personId: string, keep: string | null): Promise<void> {
	await database()
		.delete(sessions)
		.where(and(eq(sessions.personId, personId), keep === null ? undefined : ne(sessions.tokenHash, keep)));
}

/** Ends a person's sessions and keys in one office: they left. */
export async function endAccess(organisationId: string, personId: string, at: Date): Promise<void> {
	await database()
		.delete(sessions)
		.where(and(eq(sessions.personId, personId), eq(sessions.organisationId, organisationId)));
	await database()
		.update(apiKeys)
		.set({ revokedAt: at })
		.where(and(eq(apiKeys.personId, personId), eq(apiKeys.organisationId, organisationId), isNull(apiKeys.revokedAt)));
}

export async function renameOrganisation(id: string, name: string): Promise<void> {
	await database().update(organisations).set({ name }).where(eq(organisations.id, id));
}

/** Takes an office away with everything in it; people who belong to no other office go too. */
export async function deleteOrganisation(id: string): Promise<void> {
	await database().transaction(async (tx) => {
		await tx.execute(sql`select set_config('app.organisation', ${id}, true)`);
		const gone = await tx.select({ personId: members.personId }).from(members).where(eq(members.organisationId, id));
		await tx.delete(organisations).where(eq(organisations.id, id));
		for (const { personId } of gone) {
			const [other] = await tx.select({ id: members.personId }).from(members).where(eq(members.personId, personId));
			if (!other) await tx.delete(people).where(eq(people.id, personId));
		}
	});
}
