import { notFound } from '$lib/model/errors';
import { MAIL_KINDS, type MailKind } from '$lib/model/mail';
import type { Actor } from '$lib/model/people';
import { demand } from '$lib/server/auth/guard';
import { hashToken, randomToken } from '$lib/server/auth/tokens';
import { config, now } from '$lib/server/config';
import { enqueueMail } from '$lib/server/jobs/queue';
import { mailer } from '$lib/server/mail';
import { findPerson, listMembers, listOrganisations, updatePerson } from '$lib/server/repositories/identity';
import {
	findMail,
	insertMail,
	listForgotten,
	listMails,
	markTried,
	updateMail,
	type MailRow
} from '$lib/server/repositories/mails';
import { findToken, insertToken } from '$lib/server/repositories/tokens';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { objectStore, readObject } from '$lib/server/store';
import { randomUUID } from 'node:crypto';
import { mailHtml, mailText, type MailBody } from './mail-body';

/** The outbox: every message is stored first, sent by a job, and tried again when it fails. */

const YEAR = 365 * 86_400_000;
/** A queued message without a try for this long has lost its job. */
const FORGOTTEN_MS = 60_000;

export type Letter = {
	kind: MailKind;
	to: string;
	personId?: string | null;
	subject: string;
	body: MailBody;
	attachments?: { name: string; type: string; bytes: Uint8Array }[];
	/** a message with the same key is queued once */
	dedupeKey?: string;
};

/** The product's own address, for links in messages. */
export const origin = (): string => config().ORIGIN ?? 'http://127.0.0.1:3000';

/** The address that takes a person off one kind of message with one click; null where there is no choice. */
async function unsubscribeLink(organisationId: string, letter: Letter): Promise<string | null> {
	if (!MAIL_KINDS[letter.kind].choice || !letter.personId) return null;
	const token = randomToken();
	await insertToken({
		tokenHash: hashToken(token),
		kind: 'unsubscribe',
		organisationId,
		personId: letter.personId,
		data: { kind: letter.kind },
		expiresAt: new Date(now().getTime() + YEAR)
	});
	return `${origin()}/unsubscribe?token=${token}`;
}

/** Does this person want this kind of message? What cannot be chosen is always wanted. */
export async function isWanted(personId: string, kind: MailKind): Promise<boolean> {
	if (!MAIL_KINDS[kind].choice) return true;
	return (await findPerson(personId))?.mailChoices[kind] !== false;
}

/** Puts a message into the outbox and a job into the queue. Null when the same one is there already. */
export async function queueLetter(organisationId: string, letter: Letter): Promise<string | null> {
	const id = randomUUID();
	const unsubscribe = await unsubscribeLink(organisationId, letter);
	const because = unsubscribe ? `${letter.body.because} Stop these messages: ${unsubscribe}` : letter.body.because;
	const body = { ...letter.body, because };
	const attachments: MailRow['attachments'] = [];
	for (const [i, { name, type, bytes }] of (letter.attachments ?? []).entries()) {
		const key = `mails/${organisationId}/${id}/${i}`;
		await objectStore().keep(key, bytes);
		attachments.push({ name, type, key });
	}
	const stored = await withOrganisation(organisationId, (tx) =>
		insertMail(tx, {
			organisationId,
			id,
			kind: letter.kind,
			dedupeKey: letter.dedupeKey ?? null,
			personId: letter.personId ?? null,
			to: letter.to,
			subject: letter.subject,
			text: mailText(body),
			html: mailHtml(body),
			attachments
		})
	);
	if (stored) await enqueueMail({ organisationId, mailId: stored });
	return stored;
}

/** A link that signs in or lets in is for its receiver alone, not for who reads the outbox. */
const SECRET: ReadonlySet<string> = new Set(['invitation', 'reset', 'email-change']);
/** The same text with the secret of every link taken out. */
export const withoutToken = (text: string): string => text.replaceAll(/([?&]token=)[\w-]+/g, '$1…');

const LINK = /Stop these messages: (\S+)/;

/** Sends one message of the outbox. A failure is noted there and thrown, so that the queue tries again. */
export async function sendMail(job: { organisationId: string; mailId: string }): Promise<void> {
	const row = await withOrganisation(job.organisationId, (tx) => findMail(tx, job.mailId));
	if (!row || row.state === 'sent') return;
	let failure: string | null = null;
	try {
		const attachments = [];
		for (const { name, type, key } of row.attachments) attachments.push({ name, type, bytes: await readObject(key) });
		const { id, to, subject, text, html } = row;
		await mailer().send({ id, to, subject, text, html, attachments, unsubscribe: LINK.exec(text)?.[1] ?? null });
	} catch (error) {
		failure = error instanceof Error ? error.message : String(error);
	}
	await withOrganisation(job.organisationId, async (tx) => {
		await markTried(tx, row.id, now(), failure);
		// The receiver has the link now; the outbox needs it no longer.
		if (failure === null && SECRET.has(row.kind))
			await updateMail(tx, row.id, { text: withoutToken(row.text), html: withoutToken(row.html ?? '') });
	});
	if (failure !== null) throw new Error(failure);
}

/** Queues again what waits without a job (a process died between storing and queuing). */
export async function sweepMails(): Promise<void> {
	const before = new Date(now().getTime() - FORGOTTEN_MS);
	for (const { id: organisationId } of await listOrganisations()) {
		const ids = await withOrganisation(organisationId, (tx) => listForgotten(tx, before));
		for (const mailId of ids) await enqueueMail({ organisationId, mailId });
	}
}

const mailShape = (row: MailRow) => ({
	id: row.id,
	kind: row.kind,
	to: row.to,
	subject: row.subject,
	text: row.text,
	attachments: row.attachments.map(({ name, type }) => ({ name, type })),
	state: row.state,
	tries: row.tries,
	error: row.error,
	createdAt: row.createdAt.toISOString(),
	triedAt: row.triedAt?.toISOString() ?? null,
	sentAt: row.sentAt?.toISOString() ?? null
});
export type Mail = ReturnType<typeof mailShape>;

const hideSecrets = (mail: Mail): Mail => (SECRET.has(mail.kind) ? { ...mail, text: withoutToken(mail.text) } : mail);

/** The outbox, newest first. */
export async function mailsOf(actor: Actor): Promise<Mail[]> {
	demand(actor, 'readOffice');
	const rows = await withOrganisation(actor.organisationId, (tx) => listMails(tx, 500));
	return rows.map(mailShape).map(hideSecrets);
}

/** Tries a message again now. @throws AppError `not-found` */
export async function retryMail(actor: Actor, id: string): Promise<void> {
	demand(actor, 'readOffice');
	const { organisationId } = actor;
	await withOrganisation(organisationId, async (tx) => {
		const row = await findMail(tx, id);
		if (!row || row.state === 'sent') throw notFound('message that waits');
		await updateMail(tx, id, { state: 'queued', error: null });
	});
	await enqueueMail({ organisationId, mailId: id });
}

/** What an unsubscribe address is about; null when it is none (any more). */
export async function unsubscribeOf(token: string): Promise<{ kind: MailKind; email: string } | null> {
	const found = await findToken(hashToken(token), 'unsubscribe', now());
	const person = found?.personId ? await findPerson(found.personId) : null;
	const kind = found?.data['kind'];
	return person && typeof kind === 'string' && kind in MAIL_KINDS
		? { kind: kind as MailKind, email: person.email }
		: null;
}

/** Takes a person off one kind of message. The address may be used again; it does the same. */
export async function unsubscribe(token: string): Promise<boolean> {
	const found = await findToken(hashToken(token), 'unsubscribe', now());
	const person = found?.personId ? await findPerson(found.personId) : null;
	const kind = found?.data['kind'];
	if (!person || typeof kind !== 'string') return false;
	await updatePerson(person.id, { mailChoices: { ...person.mailChoices, [kind]: false } });
	return true;
}

/** Present members of some roles who want a kind of message and may see a site. */
export async function receiversOf(
	organisationId: string,
	kind: MailKind,
	wanted: { roles: readonly string[]; personIds?: readonly string[]; siteId?: string }
): Promise<{ personId: string; email: string; name: string }[]> {
	const members = (await listMembers(organisationId)).filter(
		({ personId, role, leftAt, siteIds }) =>
			leftAt === null &&
			role !== 'client' &&
			(wanted.roles.includes(role) || wanted.personIds?.includes(personId)) &&
			(!wanted.siteId || siteIds === null || siteIds.includes(wanted.siteId))
	);
	const receivers = [];
	for (const { personId, email, name } of members)
		if (await isWanted(personId, kind)) receivers.push({ personId, email, name });
	return receivers;
}
