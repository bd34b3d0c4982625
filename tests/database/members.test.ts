import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { Actor } from '$lib/model/people';
import { invitationInputSchema } from '$lib/model/wire/office';
import { useFreshDatabase } from './support/fresh';
import { deliver, linkIn } from './support/letters';
import { invitedOffice, PASSWORD, type Office } from './support/office';
import { plainText, usePost } from './support/post';

// Invented people throughout.
useFreshDatabase();
const post = usePost();
let office: Office;

beforeAll(async () => {
	office = await invitedOffice();
});
beforeEach(() => {
	post.messages.length = 0;
});

async function inviteAs(actor: Actor, email: string, over: object = {}): Promise<string> {
	const { invite } = await import('$lib/server/services/members');
	await invite(actor, invitationInputSchema.parse({ email, name: 'Newcomer', role: 'technician', ...over }));
	await deliver(office);
	return linkIn(post.messages, email.toLowerCase(), 'invitation');
}
async function sessionActor(email: string, password = PASSWORD): Promise<Actor | null> {
	const { signIn } = await import('$lib/server/services/people');
	const { readSession } = await import('$lib/server/auth/sessions');
	const { token } = await signIn(email, password, '10.2.0.1', null);
	return (await readSession(token, new Date()))?.actor ?? null;
}

describe('an invitation', () => {
	it('comes by mail, makes a member once, and is not stored in the clear', async () => {
		const { acceptInvitation, invitationOf, membersOf } = await import('$lib/server/services/members');
		const token = await inviteAs(office.owner, 'New@office.test', { siteIds: [office.siteId] });
		expect(plainText(post.messages[0]?.raw ?? '')).toContain('Owner invites you as service technician');
		expect(await invitationOf(token)).toMatchObject({ office: 'Office', email: 'new@office.test', known: false });
		expect((await membersOf(office.manager)).invitations).toMatchObject([{ email: 'new@office.test' }]);
		const { database } = await import('$lib/server/db/client');
		const { tokens } = await import('$lib/server/db/schema/identity');
		expect(JSON.stringify(await database().select().from(tokens))).not.toContain(token);
		const short = acceptInvitation(token, { name: 'New', password: 'short' });
		await expect(short).rejects.toMatchObject({ errors: [{ field: 'password' }] });
		const person = { name: 'Newly Come', password: 'a fresh long one' };
		await acceptInvitation(token, person);
		await expect(acceptInvitation(token, person)).rejects.toMatchObject({ kind: 'invalid' });
		expect(await sessionActor('new@office.test', person.password)).toMatchObject({
			name: 'Newly Come',
			role: 'technician',
			siteIds: [office.siteId]
		});
		expect((await membersOf(office.owner)).invitations).toEqual([]);
	});

	it('is the owner’s to send, to no present member, and a client’s names its sites', async () => {
		await expect(inviteAs(office.manager, 'a@office.test')).rejects.toMatchObject({ kind: 'forbidden' });
		await expect(inviteAs(office.owner, 'engineer@office.test')).rejects.toMatchObject({ kind: 'conflict' });
		expect(() => invitationInputSchema.parse({ email: 'c@d.test', name: 'C', role: 'client' })).toThrow(/sites/);
		const elsewhere = { siteIds: ['00000000-0000-4000-8000-000000000000'] };
		await expect(inviteAs(office.owner, 'a@office.test', elsewhere)).rejects.toMatchObject({ kind: 'invalid' });
	});

	it('is replaced by a newer one, and can be taken back', async () => {
		const { invitationOf, withdrawInvitation } = await import('$lib/server/services/members');
		const first = await inviteAs(office.owner, 'late@office.test');
		const second = await inviteAs(office.owner, 'late@office.test');
		expect(await invitationOf(first)).toBeNull();
		expect(await invitationOf(second)).not.toBeNull();
		await withdrawInvitation(office.owner, 'Late@office.test');
		expect(await invitationOf(second)).toBeNull();
		await expect(withdrawInvitation(office.owner, 'late@office.test')).rejects.toMatchObject({ kind: 'not-found' });
	});
});

describe('roles and sites', () => {
	it('change at once, for sessions and for keys made before', async () => {
		const { changeMember } = await import('$lib/server/services/members');
		const { keyForMember } = await import('$lib/server/services/keys');
		const { readApiKey } = await import('$lib/server/auth/api-keys');
		const { sitesOf } = await import('$lib/server/services/sites');
		const key = await keyForMember('engineer@office.test', 'gateway', ['write'], null);
		await changeMember(office.owner, office.engineer.personId, { role: 'technician', siteIds: [office.otherSiteId] });
		const actor = await sessionActor('engineer@office.test');
		expect(actor).toMatchObject({ role: 'technician', siteIds: [office.otherSiteId] });
		const byKey = (await readApiKey(key, new Date()))?.actor;
		expect(byKey).toMatchObject({ role: 'technician', siteIds: [office.otherSiteId] });
		if (byKey) expect((await sitesOf(byKey)).map((site) => site.id)).toEqual([office.otherSiteId]);
		await changeMember(office.owner, office.engineer.personId, { role: 'engineer', siteIds: null });
	});

	it('keep an owner in the office, and a client on named sites', async () => {
		const { changeMember, endMembership } = await import('$lib/server/services/members');
		const { personId } = office.owner;
		await expect(changeMember(office.owner, personId, { role: 'manager' })).rejects.toMatchObject({ kind: 'conflict' });
		await expect(endMembership(office.owner, personId)).rejects.toMatchObject({ kind: 'conflict' });
		await expect(changeMember(office.owner, personId, { siteIds: [office.siteId] })).rejects.toMatchObject({
			kind: 'invalid'
		});
		for (const siteIds of [null, []])
			await expect(changeMember(office.owner, office.client.personId, { siteIds })).rejects.toMatchObject({
				errors: [{ field: 'siteIds' }]
			});
		await expect(changeMember(office.manager, personId, { role: 'owner' })).rejects.toMatchObject({
			kind: 'forbidden'
		});
	});
});

describe('a member who leaves', () => {
	it('is out at once, with sessions and keys, and what they did stays under their name', async () => {
		const { endMembership, membersOf } = await import('$lib/server/services/members');
		const { recordChange } = await import('$lib/server/services/changes');
		const { changesOf } = await import('$lib/server/services/changes');
		const { changeInputSchema } = await import('$lib/model/wire/field');
		const { keyForMember } = await import('$lib/server/services/keys');
		const { readApiKey } = await import('$lib/server/auth/api-keys');
		const { signIn } = await import('$lib/server/services/people');
		const { readSession } = await import('$lib/server/auth/sessions');
		const change = changeInputSchema.parse({ kind: 'valve', text: 'Valve replaced' });
		await recordChange(office.technician, office.unitId, change);
		const { token } = await signIn('technician@office.test', PASSWORD, '10.2.0.1', null);
		const key = await keyForMember('technician@office.test', 'phone', ['write'], null);
		await endMembership(office.owner, office.technician.personId);
		expect(await readSession(token, new Date())).toBeNull();
		expect(await readApiKey(key, new Date())).toBeNull();
		await expect(sessionActor('technician@office.test')).rejects.toMatchObject({ kind: 'unauthenticated' });
		const { members } = await membersOf(office.owner);
		expect(members.find(({ id }) => id === office.technician.personId)?.leftAt).not.toBeNull();
		expect(JSON.stringify(await changesOf(office.owner, office.unitId))).toContain('technician');
	});

	it('comes back by a new invitation with the password they had; the old keys stay ended', async () => {
		const { acceptInvitation, invitationOf } = await import('$lib/server/services/members');
		const token = await inviteAs(office.owner, 'technician@office.test', { role: 'engineer' });
		expect((await invitationOf(token))?.known).toBe(true);
		await acceptInvitation(token, null);
		expect(await sessionActor('technician@office.test')).toMatchObject({ role: 'engineer' });
	});
});

it('leaves a trail of who invited, joined, changed and ended whom', async () => {
	const { auditOf } = await import('$lib/server/services/office');
	const lines = await auditOf(office.owner, { limit: 200 });
	const said = lines.map(({ by, action, subject }) => `${by} ${action} ${subject}`);
	for (const line of [
		'Owner invited member',
		'Newly Come joined member',
		'Owner changed member',
		'Owner ended member',
		'Owner withdrew invitation'
	])
		expect(said).toContain(line);
	const narrowed = lines.find((line) => line.action === 'changed' && line.subjectId === office.engineer.personId);
	expect(narrowed?.before).toBeTruthy();
	await expect(auditOf(office.manager, { limit: 10 })).rejects.toMatchObject({ kind: 'forbidden' });
});
