import { TOTP, Secret } from 'otpauth';
import { beforeAll, describe, expect, it } from 'vitest';
import { useFreshDatabase } from './support/fresh';
import { invitedOffice, PASSWORD, type Office } from './support/office';
import { usePost } from './support/post';

// Invented people throughout.
useFreshDatabase();
usePost();
// A clock that stands, so that no step of 30 s ends between making a code and giving it.
const AT = new Date('2026-03-02T06:00:10Z');
process.env.FIXED_NOW = AT.toISOString();
let office: Office;
let secret = '';
let recoveryCodes: string[] = [];

beforeAll(async () => {
	office = await invitedOffice();
});

/** The code an authenticator shows, some steps of 30 s away. */
const codeAt = (steps: number): string =>
	new TOTP({ secret: Secret.fromBase32(secret), digits: 6, period: 30 }).generate({
		timestamp: AT.getTime() + steps * 30_000
	});
async function signIn(code: string, sender = '10.3.0.1') {
	const people = await import('$lib/server/services/people');
	return people.signIn('owner@office.test', PASSWORD, sender, null, code);
}

describe('two-step sign-in', () => {
	it('is begun with the password and turned on by a first code', async () => {
		const { beginTwoStep, confirmTwoStep } = await import('$lib/server/services/two-step');
		await expect(beginTwoStep(office.owner, 'not it')).rejects.toMatchObject({ errors: [{ field: 'password' }] });
		const key = { ...office.owner, via: 'key' as const };
		await expect(beginTwoStep(key, PASSWORD)).rejects.toMatchObject({ kind: 'forbidden' });
		({ secret } = await beginTwoStep(office.owner, PASSWORD));
		await signIn('');
		await expect(confirmTwoStep(office.owner, '000000')).rejects.toMatchObject({ errors: [{ field: 'code' }] });
		({ recoveryCodes } = await confirmTwoStep(office.owner, codeAt(-1)));
		expect(recoveryCodes).toHaveLength(10);
		await expect(beginTwoStep(office.owner, PASSWORD)).rejects.toMatchObject({ kind: 'conflict' });
		const { auditOf } = await import('$lib/server/services/office');
		const [line] = await auditOf(office.owner, { limit: 1 });
		expect(line).toMatchObject({
			by: 'Owner',
			subject: 'their own account',
			after: { what: 'Two-step sign-in is on' }
		});
		expect(JSON.stringify(line)).not.toContain(secret);
	});

	it('asks for a code after the right password only, and takes each once', async () => {
		const people = await import('$lib/server/services/people');
		await expect(signIn('')).rejects.toMatchObject({ kind: 'unauthenticated', errors: [{ field: 'code' }] });
		const wrong = people.signIn('owner@office.test', 'not the password', '10.3.0.1', null, codeAt(0));
		await expect(wrong).rejects.toMatchObject({ kind: 'unauthenticated', errors: [] });
		const code = codeAt(1);
		const twice = await Promise.allSettled([signIn(code), signIn(code)]);
		expect(twice.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
	});

	it('takes a recovery code once, also when it comes twice at once; only hashes are stored', async () => {
		const { findPerson } = await import('$lib/server/repositories/identity');
		const code = recoveryCodes[0] ?? '';
		const twice = await Promise.allSettled([signIn(code.toUpperCase()), signIn(code)]);
		expect(twice.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
		const person = await findPerson(office.owner.personId);
		expect(person?.recoveryHashes).toHaveLength(9);
		for (const kept of recoveryCodes) expect(JSON.stringify(person?.recoveryHashes)).not.toContain(kept);
	});

	it('stops after ten wrong codes, from wherever they come', async () => {
		const tries: unknown[] = [];
		for (let i = 0; i < 11; i++) tries.push(await signIn('000000', `10.3.1.${i}`).catch((error: unknown) => error));
		expect(tries.at(-1)).toMatchObject({ kind: 'too-many', retryAfterSeconds: expect.any(Number) });
	});
});

describe('an office that asks its owners for it', () => {
	it('holds an owner without it, and no other member', async () => {
		const { changeSettings } = await import('$lib/server/services/office');
		const { beginSession, readSession } = await import('$lib/server/auth/sessions');
		const { addMember, actorFor } = await import('$lib/server/services/people');
		const due = async (email: string): Promise<boolean | undefined> => {
			const actor = await actorFor(email);
			const { token } = await beginSession(actor.personId, actor.organisationId, null, AT);
			return (await readSession(token, AT))?.twoStepDue;
		};
		const second = { email: 'second@office.test', name: 'Second', password: PASSWORD, role: 'owner' as const };
		await addMember(office.organisationId, { ...second, siteIds: null });
		expect(await due(second.email)).toBe(false);
		await expect(changeSettings(office.manager, { requireTwoStep: true })).rejects.toMatchObject({ kind: 'forbidden' });
		await changeSettings(office.owner, { requireTwoStep: true });
		expect(await due(second.email)).toBe(true);
		expect(await due('owner@office.test')).toBe(false);
		expect(await due('engineer@office.test')).toBe(false);
	});
});
