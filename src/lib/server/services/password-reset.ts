import { AppError } from '$lib/model/errors';
import { hashPassword } from '$lib/server/auth/passwords';
import { countLetter } from '$lib/server/auth/rate-limits';
import { hashToken, randomToken } from '$lib/server/auth/tokens';
import { now } from '$lib/server/config';
import {
	deleteSessionsOf,
	findPerson,
	findPersonByEmail,
	membershipsOf,
	updatePerson
} from '$lib/server/repositories/identity';
import { endTokensOf, findToken, insertToken, useToken } from '$lib/server/repositories/tokens';
import { setTimeout as pause } from 'node:timers/promises';
import { origin, queueLetter } from './mails';
import { demandLength } from './people';
import { tellSafety } from './safety-mail';

/** A forgotten password: a link to the address that is known, used once. */

const HOUR = 3_600_000;
/** Every answer takes at least this long, so that its time does not tell whether the address is known. */
const LEAST_MS = 400;

async function sendLink(email: string): Promise<void> {
	const person = await findPersonByEmail(email);
	const office = person && (await membershipsOf(person.id))[0];
	if (!person || !office) return;
	const token = randomToken();
	await endTokensOf(person.id, ['reset'], now());
	await insertToken({
		tokenHash: hashToken(token),
		kind: 'reset',
		personId: person.id,
		expiresAt: new Date(now().getTime() + HOUR)
	});
	await queueLetter(office.organisationId, {
		kind: 'reset',
		to: person.email,
		personId: person.id,
		subject: 'Choose a new password',
		body: {
			title: 'Choose a new password',
			paragraphs: ['Somebody, most likely you, asked for it. The link works once, within the hour.'],
			link: { words: 'Choose a password', href: `${origin()}/reset?token=${token}` },
			because: 'If it was not you, do nothing: your password stays as it is.'
		}
	});
}

/**
 * Sends a link to choose a new password; an earlier one ends. Whether the address is known is not said.
 * @throws AppError `too-many`
 */
export async function askReset(email: string, sender: string): Promise<void> {
	await countLetter(email, sender);
	await Promise.all([sendLink(email), pause(LEAST_MS)]);
}

/** Does a reset link still work? */
export const resetStands = async (token: string): Promise<boolean> =>
	(await findToken(hashToken(token), 'reset', now())) !== null;

/**
 * Sets a new password by a reset link, and signs the person out everywhere. Two-step sign-in stays as it is.
 * @throws AppError `invalid` for a link that is used or too old, or a short password
 */
export async function resetPassword(token: string, password: string): Promise<void> {
	demandLength(password);
	const found = await findToken(hashToken(token), 'reset', now());
	const person = found?.personId ? await findPerson(found.personId) : null;
	if (!found || !person || !(await useToken(found.tokenHash, now())))
		throw new AppError('invalid', 'This link has expired or was used. Ask for a new one.');
	await updatePerson(person.id, { passwordHash: await hashPassword(password) });
	await deleteSessionsOf(person.id);
	await tellSafety(
		person,
		'Your password was changed',
		'It was changed by a link to this address. All sessions were ended.'
	);
}
