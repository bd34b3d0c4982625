import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { useFreshDatabase } from './support/fresh';
import { deliver, linkIn } from './support/letters';
import { invitedOffice, PASSWORD, type Office } from './support/office';
import { plainText, usePost } from './support/post';

// Invented people throughout.
useFreshDatabase();
const post = usePost();
let office: Office;
const SENDER = '10.1.0.1';

beforeAll(async () => {
	office = await invitedOffice();
});
beforeEach(() => {
	post.messages.length = 0;
});

async function signIn(email: string, password: string, code = '') {
	const people = await import('$lib/server/services/people');
	return people.signIn(email, password, SENDER, 'a browser', code);
}
async function actorOf(token: string) {
	const { readSession } = await import('$lib/server/auth/sessions');
	return (await readSession(token, new Date()))?.actor ?? null;
}

describe('sessions', () => {
	it('are listed without their secrets, ended one by one, and only by their own person', async () => {
		const { accountOf, endOwnSession } = await import('$lib/server/services/account');
		const here = await signIn('engineer@office.test', PASSWORD);
		const there = await signIn('engineer@office.test', PASSWORD);
		const { sessions } = await accountOf(office.engineer, here.token);
		expect(sessions).toHaveLength(2);
		expect(sessions.filter(({ present }) => present)).toHaveLength(1);
		expect(JSON.stringify(sessions)).not.toContain(here.token);
		const other = sessions.find(({ present }) => !present);
		await expect(endOwnSession(office.manager, other?.id ?? '')).rejects.toMatchObject({ kind: 'not-found' });
		const key = { ...office.engineer, via: 'key' as const };
		await expect(endOwnSession(key, other?.id ?? '')).rejects.toMatchObject({ kind: 'forbidden' });
		await endOwnSession(office.engineer, other?.id ?? '');
		expect(await actorOf(there.token)).toBeNull();
		expect(await actorOf(here.token)).not.toBeNull();
	});

	it('end with a change of the password, but for the one that changes it', async () => {
		const { changePassword } = await import('$lib/server/services/account');
		const here = await signIn('engineer@office.test', PASSWORD);
		const there = await signIn('engineer@office.test', PASSWORD);
		const change = (old: string, password: string) => changePassword(office.engineer, old, password, here.token);
		await expect(change('not the old one', 'another long one')).rejects.toMatchObject({ errors: [{ field: 'old' }] });
		await expect(change(PASSWORD, 'short')).rejects.toMatchObject({ errors: [{ field: 'password' }] });
		await change(PASSWORD, 'another long one');
		expect(await actorOf(here.token)).not.toBeNull();
		expect(await actorOf(there.token)).toBeNull();
		await expect(signIn('engineer@office.test', PASSWORD)).rejects.toMatchObject({ kind: 'unauthenticated' });
		await signIn('engineer@office.test', 'another long one');
		await deliver(office);
		expect(post.messages.map(({ to }) => to.join())).toEqual(['engineer@office.test']);
		expect(plainText(post.messages[0]?.raw ?? '')).toContain('Your password was changed');
	});
});

describe('a forgotten password', () => {
	it('is chosen anew by a link that works once; only the link’s hash is stored, and sessions end', async () => {
		const { askReset, resetPassword, resetStands } = await import('$lib/server/services/password-reset');
		const session = await signIn('technician@office.test', PASSWORD);
		await askReset('Technician@office.test', SENDER);
		await deliver(office);
		const first = linkIn(post.messages, 'technician@office.test', 'reset');
		await askReset('technician@office.test', SENDER);
		await deliver(office);
		const token = linkIn(post.messages, 'technician@office.test', 'reset');
		expect(token).not.toBe(first);
		expect(await resetStands(first)).toBe(false);
		const { database } = await import('$lib/server/db/client');
		const { tokens } = await import('$lib/server/db/schema/identity');
		expect(JSON.stringify(await database().select().from(tokens))).not.toContain(token);

		await expect(resetPassword(token, 'short')).rejects.toMatchObject({ errors: [{ field: 'password' }] });
		const both = await Promise.allSettled([
			resetPassword(token, 'a third long one'),
			resetPassword(token, 'a third long one')
		]);
		expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
		expect(await actorOf(session.token)).toBeNull();
		await signIn('technician@office.test', 'a third long one');
	});

	it('says the same of a known and an unknown address, in as much time, and stops after some', async () => {
		const { askReset } = await import('$lib/server/services/password-reset');
		const began = performance.now();
		expect(await askReset('nobody@office.test', '10.1.0.2')).toBeUndefined();
		expect(performance.now() - began).toBeGreaterThan(390);
		await deliver(office);
		expect(post.messages.flatMap(({ to }) => to)).not.toContain('nobody@office.test');
		const tries = Array.from({ length: 6 }, () => askReset('other@office.test', '10.1.0.3').catch((e: unknown) => e));
		expect((await Promise.all(tries)).filter((result) => result !== undefined)).toMatchObject([{ kind: 'too-many' }]);
	});

	it('is not chosen by a link that is too old', async () => {
		const { insertToken } = await import('$lib/server/repositories/tokens');
		const { hashToken } = await import('$lib/server/auth/tokens');
		const { resetPassword } = await import('$lib/server/services/password-reset');
		const expiresAt = new Date(Date.now() - 1000);
		const { personId } = office.manager;
		await insertToken({ tokenHash: hashToken('late'), kind: 'reset', personId, expiresAt });
		await expect(resetPassword('late', 'a fourth long one')).rejects.toMatchObject({ kind: 'invalid' });
		await signIn('manager@office.test', PASSWORD);
	});
});

describe('another address', () => {
	it('is taken over by its own link, by its own person, and the old one is told', async () => {
		const { askEmailChange, confirmEmailChange } = await import('$lib/server/services/account');
		const ask = (password: string) => askEmailChange(office.manager, 'New.Manager@office.test', password);
		await expect(ask('not it')).rejects.toMatchObject({ errors: [{ field: 'password' }] });
		await ask(PASSWORD);
		await deliver(office);
		expect(post.messages.map(({ to }) => to.join())).toEqual(['New.Manager@office.test']);
		const token = linkIn(post.messages, 'New.Manager@office.test', 'account/address');
		await expect(confirmEmailChange(office.engineer, token)).rejects.toMatchObject({ kind: 'invalid' });
		expect(await confirmEmailChange(office.manager, token)).toBe('new.manager@office.test');
		await expect(confirmEmailChange(office.manager, token)).rejects.toMatchObject({ kind: 'invalid' });
		await signIn('new.manager@office.test', PASSWORD);
		await expect(signIn('manager@office.test', PASSWORD)).rejects.toMatchObject({ kind: 'unauthenticated' });
		post.messages.length = 0;
		await deliver(office);
		expect(post.messages.map(({ to }) => to.join())).toEqual(['manager@office.test']);
	});

	it('that is somebody’s is refused only to who can open its link', async () => {
		const { askEmailChange, confirmEmailChange } = await import('$lib/server/services/account');
		await askEmailChange(office.manager, 'client@office.test', PASSWORD);
		await deliver(office);
		const token = linkIn(post.messages, 'client@office.test', 'account/address');
		await expect(confirmEmailChange(office.manager, token)).rejects.toMatchObject({ kind: 'conflict' });
	});
});

describe('somebody of two offices', () => {
	it('goes over from one to the other with the session that asks, and to no third', async () => {
		const { accountOf, enterOffice } = await import('$lib/server/services/account');
		const { addMember } = await import('$lib/server/services/people');
		const other = await invitedOffice('Second');
		const third = await invitedOffice('Third');
		const member = { email: 'client@office.test', name: 'client', password: null, role: 'technician' as const };
		await addMember(other.organisationId, { ...member, siteIds: null });
		const here = await signIn('client@office.test', PASSWORD);
		const elsewhere = await signIn('client@office.test', PASSWORD);
		const actor = await actorOf(here.token);
		if (!actor) throw new Error('no session');
		expect((await accountOf(actor, here.token)).offices).toMatchObject([
			{ name: 'Office', role: 'client', present: true },
			{ name: 'Second', role: 'technician', present: false }
		]);
		await enterOffice(actor, other.organisationId, here.token);
		expect(await actorOf(here.token)).toMatchObject({ organisationId: other.organisationId, role: 'technician' });
		expect(await actorOf(elsewhere.token)).toMatchObject({ organisationId: office.organisationId, role: 'client' });
		await expect(enterOffice(actor, third.organisationId, here.token)).rejects.toMatchObject({ kind: 'not-found' });
	});
});

describe('mail choices', () => {
	it('are kept one by one, and a key cannot change them', async () => {
		const { accountOf, changeAccount } = await import('$lib/server/services/account');
		await changeAccount(office.owner, { mailChoices: { digest: false } });
		await changeAccount(office.owner, { mailChoices: { 'late-log': false }, name: 'Owner of it' });
		expect(await accountOf(office.owner, null)).toMatchObject({
			name: 'Owner of it',
			mailChoices: { digest: false, 'late-log': false, 'repeat-trip': true }
		});
		const key = { ...office.owner, via: 'key' as const };
		await expect(changeAccount(key, { name: 'No' })).rejects.toMatchObject({ kind: 'forbidden' });
	});
});
