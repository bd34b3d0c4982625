import {
	deleteSession,
	deleteSessionsOf,
	findSessionActor,
	insertSession,
	touchSession
} from '$lib/server/repositories/identity';
import type { Actor, Preferences } from '$lib/model/people';
import { hashToken, randomToken } from './tokens';

export const SESSION_COOKIE = 'firstpull_session';
const DAY = 86_400_000;
/** A session lives this long after it was last used … */
export const SESSION_DAYS = 30;
/** … and its expiry is moved on at most once in this time, so that not every request writes. */
const TOUCH_AFTER = DAY / 2;

/** Begins a session; the token goes into the cookie, only its hash is stored. */
export async function beginSession(
	personId: string,
	organisationId: string,
	userAgent: string | null,
	now: Date
): Promise<{ token: string; expiresAt: Date }> {
	const token = randomToken();
	const expiresAt = new Date(now.getTime() + SESSION_DAYS * DAY);
	await insertSession({
		tokenHash: hashToken(token),
		personId,
		organisationId,
		userAgent,
		createdAt: now,
		seenAt: now,
		expiresAt
	});
	return { token, expiresAt };
}

/** The member behind a session token, or null; a session in use slides on. `renewed` is set when the cookie must be too. */
export async function readSession(
	token: string,
	now: Date
): Promise<{ actor: Actor; preferences: Preferences; twoStepDue: boolean; renewed: Date | null } | null> {
	const tokenHash = hashToken(token);
	const found = await findSessionActor(tokenHash, now);
	if (!found) return null;
	const renew = now.getTime() - found.seenAt.getTime() > TOUCH_AFTER;
	const renewed = renew ? new Date(now.getTime() + SESSION_DAYS * DAY) : null;
	if (renewed) await touchSession(tokenHash, now, renewed);
	return { actor: found.actor, preferences: found.preferences, twoStepDue: found.twoStepDue, renewed };
}

export const endSession = (token: string): Promise<void> => deleteSession(hashToken(token));
/** Signs a person out everywhere. */
export const endAllSessions = (personId: string): Promise<void> => deleteSessionsOf(personId);
