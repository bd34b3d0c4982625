import type { Actor, Preferences, Role, Scope } from '$lib/model/people';
import { findKeyActor, insertApiKey, touchApiKey } from '$lib/server/repositories/identity';
import { hashToken, randomToken } from './tokens';

const PREFIX = 'fp_';
const TOUCH_AFTER = 60_000;

export type NewKey = {
	organisationId: string;
	personId: string;
	name: string;
	role: Role;
	scopes: readonly Scope[];
	siteIds: string[] | null;
	expiresAt: Date | null;
};

/** Makes a key; it is shown once, only its hash is stored. */
export async function createApiKey(key: NewKey): Promise<{ id: string; key: string }> {
	const secret = PREFIX + randomToken();
	const id = await insertApiKey({
		...key,
		scopes: [...key.scopes],
		keyHash: hashToken(secret),
		prefix: secret.slice(0, 8)
	});
	return { id, key: secret };
}

/** The member behind a key, or null when it is unknown, revoked or expired. */
export async function readApiKey(
	secret: string,
	now: Date
): Promise<{ actor: Actor; preferences: Preferences } | null> {
	if (!secret.startsWith(PREFIX)) return null;
	const found = await findKeyActor(hashToken(secret), now);
	if (!found) return null;
	if (!found.usedAt || now.getTime() - found.usedAt.getTime() > TOUCH_AFTER) await touchApiKey(found.keyId, now);
	return found;
}
