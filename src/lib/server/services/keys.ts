import { AppError, notFound } from '$lib/model/errors';
import { ROLES, type Actor, type Role, type Scope } from '$lib/model/people';
import { createApiKey } from '$lib/server/auth/api-keys';
import { demand } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { recordAudit } from '$lib/server/repositories/audit';
import { listApiKeys, revokeApiKey } from '$lib/server/repositories/identity';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { actorFor } from './people';

type NewKeyInput = { name: string; role: Role; scopes: Scope[]; siteIds: string[] | null; expiresAt: string | null };

/** Makes a key that may do at most what its maker may. @throws AppError `forbidden` for a wider role */
export async function makeKey(actor: Actor, input: NewKeyInput): Promise<{ id: string; key: string }> {
	demand(actor, 'office');
	if (ROLES.indexOf(input.role) < ROLES.indexOf(actor.role))
		throw new AppError('forbidden', 'A key may not do more than its maker.');
	const expiresAt = input.expiresAt ? new Date(input.expiresAt) : null;
	const made = await createApiKey({
		...input,
		expiresAt,
		organisationId: actor.organisationId,
		personId: actor.personId
	});
	const { name, role, scopes, siteIds } = input;
	await withOrganisation(actor.organisationId, (tx) =>
		recordAudit(tx, actor, {
			action: 'added',
			subject: 'API key',
			subjectId: made.id,
			after: { name, role, scopes, siteIds }
		})
	);
	return made;
}

/** The office's keys, newest first, without their secrets. */
export async function keysOf(actor: Actor) {
	demand(actor, 'office');
	const rows = await listApiKeys(actor.organisationId);
	return rows.map((row) => ({
		id: row.id,
		name: row.name,
		prefix: row.prefix,
		member: row.personName,
		role: row.role,
		scopes: row.scopes,
		siteIds: row.siteIds,
		expiresAt: row.expiresAt?.toISOString() ?? null,
		usedAt: row.usedAt?.toISOString() ?? null,
		revokedAt: row.revokedAt?.toISOString() ?? null,
		createdAt: row.createdAt.toISOString()
	}));
}

/** Ends a key at once. @throws AppError `not-found` */
export async function revokeKey(actor: Actor, id: string): Promise<void> {
	demand(actor, 'office');
	if (!(await revokeApiKey(actor.organisationId, id, now()))) throw notFound('key');
	await withOrganisation(actor.organisationId, (tx) =>
		recordAudit(tx, actor, { action: 'revoked', subject: 'API key', subjectId: id })
	);
}

/** A key that acts as a member with that member's role; for the admin command. @throws AppError `not-found` */
export async function keyForMember(email: string, name: string, scopes: Scope[], days: number | null): Promise<string> {
	const actor = await actorFor(email);
	const expiresAt = days === null ? null : new Date(now().getTime() + days * 86_400_000);
	const { organisationId, personId, role } = actor;
	const siteIds = actor.siteIds === null ? null : [...actor.siteIds];
	const { id, key } = await createApiKey({ organisationId, personId, role, siteIds, name, scopes, expiresAt });
	await withOrganisation(organisationId, (tx) =>
		recordAudit(
			tx,
			{ ...actor, via: 'system', name: 'admin command' },
			{ action: 'added', subject: 'API key', subjectId: id, after: { name, role, scopes } }
		)
	);
	return key;
}
