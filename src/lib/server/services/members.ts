import { AppError, notFound } from '$lib/model/errors';
import { ROLE_NAMES, type Actor, type Role } from '$lib/model/people';
import { demand } from '$lib/server/auth/guard';
import { hashPassword } from '$lib/server/auth/passwords';
import { hashToken, randomToken } from '$lib/server/auth/tokens';
import { now } from '$lib/server/config';
import { recordAudit } from '$lib/server/repositories/audit';
import {
	endAccess,
	findOrganisation,
	findPersonByEmail,
	insertMember,
	insertPerson,
	listMembers,
	updateMember
} from '$lib/server/repositories/identity';
import { listSites } from '$lib/server/repositories/plant';
import {
	endInvitations,
	findToken,
	insertToken,
	listInvitations,
	useToken,
	type TokenRow
} from '$lib/server/repositories/tokens';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { origin, queueLetter } from './mails';
import { demandLength } from './people';

/** Members of an office: invited, given roles and sites, leaving with their history kept. */

const WEEK = 7 * 86_400_000;

export type InvitationData = { email: string; name: string; role: Role; siteIds: string[] | null };
const dataOf = (row: TokenRow): InvitationData => row.data as InvitationData;

/** Members and open invitations. */
export async function membersOf(actor: Actor) {
	demand(actor, 'readOffice');
	const members = await listMembers(actor.organisationId);
	const invitations = await listInvitations(actor.organisationId, now());
	return {
		members: members.map(({ personId, name, email, role, siteIds, leftAt, createdAt }) => ({
			id: personId,
			name,
			email,
			role,
			siteIds,
			leftAt: leftAt?.toISOString() ?? null,
			since: createdAt.toISOString()
		})),
		invitations: invitations.map((row) => ({
			...dataOf(row),
			sentAt: row.createdAt.toISOString(),
			expiresAt: row.expiresAt.toISOString()
		}))
	};
}

/** Do role and sites go together? @throws AppError `invalid` with the field `siteIds` */
async function grantFits(actor: Actor, role: Role, siteIds: readonly string[] | null): Promise<void> {
	const wrong = (message: string): AppError =>
		new AppError('invalid', message, { errors: [{ field: 'siteIds', message }] });
	if (role === 'client' && (siteIds === null || siteIds.length === 0))
		throw wrong('Choose the sites a client may see.');
	if (role === 'owner' && siteIds !== null) throw wrong('An owner sees every site.');
	if (siteIds === null) return;
	if (siteIds.length === 0) throw wrong('Choose at least one site, or every site.');
	const known = new Set((await withOrganisation(actor.organisationId, listSites)).map((site) => site.id));
	if (siteIds.every((id) => known.has(id))) return;
	throw wrong('Some of these sites are not of this office.');
}

/**
 * Invites somebody by mail; the link works once, within a week, and an earlier one to the same address ends.
 * @throws AppError `conflict` for a present member, `invalid` for sites that do not fit
 */
export async function invite(actor: Actor, input: InvitationData): Promise<void> {
	demand(actor, 'office');
	await grantFits(actor, input.role, input.siteIds);
	const email = input.email.toLowerCase();
	const already = (await listMembers(actor.organisationId)).find((member) => member.email === email && !member.leftAt);
	if (already)
		throw new AppError('conflict', `${email} is a member already.`, {
			errors: [{ field: 'email', message: 'a member already' }]
		});
	const office = await findOrganisation(actor.organisationId);
	const token = randomToken();
	await endInvitations(actor.organisationId, email, now());
	await insertToken({
		tokenHash: hashToken(token),
		kind: 'invitation',
		organisationId: actor.organisationId,
		data: { ...input, email },
		expiresAt: new Date(now().getTime() + WEEK)
	});
	await queueLetter(actor.organisationId, {
		kind: 'invitation',
		to: email,
		subject: `${actor.name} invites you to ${office?.name ?? 'an office'} on Firstpull`,
		body: {
			title: `You are invited to ${office?.name ?? 'an office'}`,
			paragraphs: [`${actor.name} invites you as ${ROLE_NAMES[input.role]}. The link works once, within a week.`],
			link: { words: 'Come in', href: `${origin()}/invitation?token=${token}` },
			because: 'If you do not know them, do nothing.'
		}
	});
	await withOrganisation(actor.organisationId, (tx) =>
		recordAudit(tx, actor, { action: 'invited', subject: 'member', after: { ...input, email } })
	);
}

/** Takes an invitation back: its link works no more. @throws AppError `not-found` */
export async function withdrawInvitation(actor: Actor, email: string): Promise<void> {
	demand(actor, 'office');
	if ((await endInvitations(actor.organisationId, email.toLowerCase(), now())) === 0) throw notFound('invitation');
	await withOrganisation(actor.organisationId, (tx) =>
		recordAudit(tx, actor, { action: 'withdrew', subject: 'invitation', before: { email: email.toLowerCase() } })
	);
}

/** What an invitation is about; null when it is none (any more). */
export async function invitationOf(
	token: string
): Promise<(InvitationData & { office: string; known: boolean }) | null> {
	const row = await findToken(hashToken(token), 'invitation', now());
	if (!row?.organisationId) return null;
	const data = dataOf(row);
	const office = (await findOrganisation(row.organisationId))?.name ?? '';
	return { ...data, office, known: (await findPersonByEmail(data.email)) !== null };
}

const goneInvitation = (): AppError =>
	new AppError('invalid', 'This invitation has expired, was used or was taken back. Ask for a new one.');

/**
 * Makes the invited person a member. Somebody new chooses a name and a password; who is known keeps theirs.
 * @throws AppError `invalid`
 */
export async function acceptInvitation(
	token: string,
	input: { name: string; password: string } | null
): Promise<{ email: string }> {
	const row = await findToken(hashToken(token), 'invitation', now());
	if (!row?.organisationId) throw goneInvitation();
	const data = dataOf(row);
	const known = await findPersonByEmail(data.email);
	if (!known) demandLength(input?.password ?? '');
	if (!(await useToken(row.tokenHash, now()))) throw goneInvitation();
	const person =
		known ??
		(await insertPerson({
			email: data.email,
			name: input?.name.trim() || data.name,
			passwordHash: await hashPassword(input?.password ?? '')
		}));
	const { organisationId } = row;
	await insertMember({ organisationId, personId: person.id, role: data.role, siteIds: data.siteIds });
	await withOrganisation(organisationId, (tx) =>
		recordAudit(
			tx,
			{
				organisationId,
				personId: person.id,
				name: person.name,
				email: person.email,
				role: data.role,
				siteIds: data.siteIds,
				via: 'session',
				scopes: null
			},
			{ action: 'joined', subject: 'member', subjectId: person.id, after: { role: data.role, siteIds: data.siteIds } }
		)
	);
	return { email: person.email };
}

/** An office always has an owner. @throws AppError `conflict` */
async function anotherOwner(actor: Actor, personId: string): Promise<void> {
	const owners = (await listMembers(actor.organisationId)).filter(({ role, leftAt }) => role === 'owner' && !leftAt);
	if (owners.some((owner) => owner.personId !== personId)) return;
	throw new AppError('conflict', 'An office needs an owner: make somebody else one first.');
}

async function memberOf(actor: Actor, personId: string) {
	const member = (await listMembers(actor.organisationId)).find((entry) => entry.personId === personId);
	if (!member) throw notFound('member');
	return member;
}

/**
 * Changes a member's role and sites; what they and their keys may do changes at once.
 * @throws AppError `conflict` for the last owner or who has left, `invalid` for sites that do not fit
 */
export async function changeMember(
	actor: Actor,
	personId: string,
	change: { role?: Role | undefined; siteIds?: string[] | null | undefined }
): Promise<void> {
	demand(actor, 'office');
	const before = await memberOf(actor, personId);
	if (before.leftAt) throw new AppError('conflict', 'This member has left. Invite them again.');
	if (change.role && change.role !== 'owner' && before.role === 'owner') await anotherOwner(actor, personId);
	const after = {
		role: change.role ?? before.role,
		siteIds: change.siteIds === undefined ? before.siteIds : change.siteIds
	};
	await grantFits(actor, after.role, after.siteIds);
	await updateMember(actor.organisationId, personId, after);
	await withOrganisation(actor.organisationId, (tx) =>
		recordAudit(tx, actor, {
			action: 'changed',
			subject: 'member',
			subjectId: personId,
			before: { name: before.name, role: before.role, siteIds: before.siteIds },
			after: { name: before.name, ...after }
		})
	);
}

/** A member leaves: sessions and keys end at once, what they did stays under their name. */
export async function endMembership(actor: Actor, personId: string): Promise<void> {
	demand(actor, 'office');
	const before = await memberOf(actor, personId);
	if (before.leftAt) return;
	if (before.role === 'owner') await anotherOwner(actor, personId);
	await updateMember(actor.organisationId, personId, { leftAt: now() });
	await endAccess(actor.organisationId, personId, now());
	await withOrganisation(actor.organisationId, (tx) =>
		recordAudit(tx, actor, {
			action: 'ended',
			subject: 'member',
			subjectId: personId,
			before: { name: before.name, role: before.role }
		})
	);
}
