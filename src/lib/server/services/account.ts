import { AppError, notFound } from '$lib/model/errors';
import { MAIL_CHOICES, type MailKind } from '$lib/model/mail';
import type { Actor } from '$lib/model/people';
import { hashPassword } from '$lib/server/auth/passwords';
import { hashToken, randomToken } from '$lib/server/auth/tokens';
import { now } from '$lib/server/config';
import {
	deleteOtherSessions,
	deleteSession,
	findOrganisation,
	findPerson,
	findPersonByEmail,
	listSessions,
	membershipsOf,
	moveSession,
	updatePerson
} from '$lib/server/repositories/identity';
import { endTokensOf, findToken, insertToken, useToken } from '$lib/server/repositories/tokens';
import { origin, queueLetter } from './mails';
import { demandLength } from './people';
import { tellSafety } from './safety-mail';
import { demandPassword } from './two-step';

/** A person's own account: password, address, sessions, what mail they want. */

const DAY = 86_400_000;

/**
 * Changes the password, with the old one; every other session and every open reset link ends.
 * @throws AppError `invalid` with the field `old` or `password`
 */
export async function changePassword(actor: Actor, old: string, password: string, keep: string | null): Promise<void> {
	demandLength(password);
	const person = await demandPassword(actor, old).catch((error: unknown) => {
		if (error instanceof AppError && error.kind === 'invalid')
			throw new AppError('invalid', error.message, { errors: [{ field: 'old', message: error.message }] });
		throw error;
	});
	await updatePerson(person.id, { passwordHash: await hashPassword(password) });
	await endTokensOf(person.id, ['reset'], now());
	await deleteOtherSessions(person.id, keep ? hashToken(keep) : null);
	await tellSafety(
		person,
		'Your password was changed',
		'It was changed while signed in. Every other session was ended.'
	);
}

/**
 * Sends a link to a new address; the old one stays until the link is opened. Whether the new one is somebody's is
 * seen only by who can open the link.
 */
export async function askEmailChange(actor: Actor, email: string, password: string): Promise<void> {
	const person = await demandPassword(actor, password);
	const token = randomToken();
	await endTokensOf(person.id, ['email'], now());
	await insertToken({
		tokenHash: hashToken(token),
		kind: 'email',
		personId: person.id,
		data: { email: email.toLowerCase() },
		expiresAt: new Date(now().getTime() + DAY)
	});
	await queueLetter(actor.organisationId, {
		kind: 'email-change',
		to: email,
		personId: person.id,
		subject: 'Is this your new address?',
		body: {
			title: 'Is this your new address?',
			paragraphs: [`${person.name} wants to sign in with this address from now on. The link works once, within a day.`],
			link: { words: 'Yes, use it', href: `${origin()}/account/address?token=${token}` },
			because: 'If it was not you, do nothing.'
		}
	});
}

/**
 * Takes the new address over; reset links that went to the old one end.
 * @throws AppError `invalid` for a link that is not this person's, `conflict` for an address that is somebody's
 */
export async function confirmEmailChange(actor: Actor, token: string): Promise<string> {
	const found = await findToken(hashToken(token), 'email', now());
	const email = found?.data['email'];
	const own = found?.personId === actor.personId && actor.via === 'session';
	if (!found || !own || typeof email !== 'string' || !(await useToken(found.tokenHash, now())))
		throw new AppError('invalid', 'This link has expired, was used, or is somebody else’s.');
	if (await findPersonByEmail(email)) throw new AppError('conflict', 'This address belongs to somebody already.');
	await updatePerson(actor.personId, { email });
	await endTokensOf(actor.personId, ['reset'], now());
	const before = { id: actor.personId, email: actor.email, name: actor.name };
	await tellSafety(before, 'Your address was changed', `You sign in as ${email} from now on.`);
	return email;
}

/** A session's public name: the head of its hash in the form of an id. */
const sessionId = (tokenHash: string): string =>
	tokenHash.slice(0, 32).replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');

/** The offices a person is a present member of, the oldest membership first. */
async function officesOf(actor: Actor) {
	const offices = [];
	for (const { organisationId, role } of await membershipsOf(actor.personId)) {
		const name = (await findOrganisation(organisationId))?.name ?? '';
		offices.push({ id: organisationId, name, role, present: organisationId === actor.organisationId });
	}
	return offices;
}

/**
 * Goes over to another office with the session that asks; the other sessions stay where they are.
 * @throws AppError `not-found` for an office this person is no member of, `forbidden` for a key
 */
export async function enterOffice(actor: Actor, organisationId: string, token: string | null): Promise<void> {
	if (actor.via !== 'session' || token === null) throw new AppError('forbidden', 'This is done signed in on a page.');
	const member = (await membershipsOf(actor.personId)).some((entry) => entry.organisationId === organisationId);
	if (!member) throw notFound('office');
	await moveSession(hashToken(token), organisationId);
}

/** Everything of a person's own account. `token` is the session that asks. @throws AppError `not-found` */
export async function accountOf(actor: Actor, token: string | null) {
	const person = await findPerson(actor.personId);
	if (!person) throw notFound('person');
	const present = token ? hashToken(token) : '';
	const live = (await listSessions(person.id)).filter((row) => row.expiresAt > now());
	return {
		name: person.name,
		email: person.email,
		hasPassword: person.passwordHash !== null,
		twoStep: { on: person.totpConfirmed, recoveryCodesLeft: person.recoveryHashes.length },
		provider: person.oidcSubject !== null,
		mailChoices: Object.fromEntries(MAIL_CHOICES.map((kind) => [kind, person.mailChoices[kind] !== false])),
		offices: await officesOf(actor),
		sessions: live.map((row) => ({
			id: sessionId(row.tokenHash),
			browser: row.userAgent,
			createdAt: row.createdAt.toISOString(),
			seenAt: row.seenAt.toISOString(),
			expiresAt: row.expiresAt.toISOString(),
			present: row.tokenHash === present
		}))
	};
}

/** Changes a person's name and what mail they want. @throws AppError `forbidden` for a key */
export async function changeAccount(
	actor: Actor,
	change: { name?: string | undefined; mailChoices?: Partial<Record<MailKind, boolean>> | undefined }
): Promise<void> {
	const person = await findPerson(actor.personId);
	if (!person || actor.via !== 'session') throw new AppError('forbidden', 'This is done signed in on a page.');
	await updatePerson(person.id, {
		...(change.name ? { name: change.name } : {}),
		...(change.mailChoices ? { mailChoices: { ...person.mailChoices, ...change.mailChoices } } : {})
	});
}

/** Ends one of a person's own sessions. @throws AppError `not-found`, `forbidden` for a key */
export async function endOwnSession(actor: Actor, id: string): Promise<void> {
	if (actor.via !== 'session') throw new AppError('forbidden', 'This is done signed in on a page.');
	const row = (await listSessions(actor.personId)).find((session) => sessionId(session.tokenHash) === id);
	if (!row) throw notFound('session');
	await deleteSession(row.tokenHash);
}
