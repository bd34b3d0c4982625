import { beforeAll, describe, expect, it } from 'vitest';
import type { Actor } from '$lib/model/people';
import { useFreshDatabase } from './support/fresh';

useFreshDatabase();

const PASSWORD = 'a long enough one';
let one: Actor;
let other: Actor;

beforeAll(async () => {
	const { actorFor, foundOrganisation } = await import('$lib/server/services/people');
	await foundOrganisation('One', { email: 'One@firstpull.test', name: 'One', password: PASSWORD });
	await foundOrganisation('Other', { email: 'other@firstpull.test', name: 'Other', password: PASSWORD });
	one = await actorFor('one@firstpull.test');
	other = await actorFor('other@firstpull.test');
});

describe('two organisations', () => {
	it('do not see each other’s sites and units', async () => {
		const { addSite, sitesOf, siteOf } = await import('$lib/server/services/sites');
		const { addUnit, unitOf, unitsOf } = await import('$lib/server/services/units');
		const site = await addSite(one, { name: 'North works', timeZone: 'Europe/London' });
		const unit = await addUnit(one, {
			siteId: site.id,
			tag: 'WCC 1',
			refrigerant: 'R-134a',
			circuits: 1,
			nature: {},
			limits: { evapSaturationCutout: -2 }
		});
		expect(unit.limits.evapSaturationCutout).toEqual([{ value: -2, provenance: 'given', validFrom: null }]);
		expect(await sitesOf(other)).toEqual([]);
		expect(await unitsOf(other)).toEqual([]);
		await expect(siteOf(other, site.id)).rejects.toMatchObject({ kind: 'not-found' });
		await expect(unitOf(other, unit.id)).rejects.toMatchObject({ kind: 'not-found' });
	});

	it('are kept apart by the database itself: no organisation set, no row; a foreign row is refused', async () => {
		const { database } = await import('$lib/server/db/client');
		const { sites } = await import('$lib/server/db/schema/plant');
		const { withOrganisation } = await import('$lib/server/repositories/transaction');
		expect(await database().select().from(sites)).toEqual([]);
		const foreign = withOrganisation(one.organisationId, (tx) =>
			tx.insert(sites).values({ organisationId: other.organisationId, name: 'Smuggled', timeZone: 'UTC' })
		);
		await expect(foreign).rejects.toMatchObject({ cause: { message: expect.stringMatching(/row-level security/) } });
	});
});

describe('the audit trail', () => {
	it('keeps who did what, and cannot be rewritten', async () => {
		const { audit } = await import('$lib/server/db/schema/circle');
		const { listAudit } = await import('$lib/server/repositories/audit');
		const { withOrganisation } = await import('$lib/server/repositories/transaction');
		const lines = await withOrganisation(one.organisationId, (tx) => listAudit(tx, 10));
		expect(lines.map((line) => `${line.byName} ${line.action} ${line.subject}`)).toEqual([
			'One added unit',
			'One added site'
		]);
		const rewrite = withOrganisation(one.organisationId, (tx) => tx.update(audit).set({ action: 'nothing' }));
		await expect(rewrite).rejects.toMatchObject({ cause: { message: expect.stringMatching(/append only/) } });
		const wipe = withOrganisation(one.organisationId, (tx) => tx.delete(audit));
		await expect(wipe).rejects.toMatchObject({ cause: { message: expect.stringMatching(/append only/) } });
	});
});

describe('sign-in', () => {
	it('takes the address in any case, and tells nobody which of the two was wrong', async () => {
		const { signIn } = await import('$lib/server/services/people');
		const { readSession } = await import('$lib/server/auth/sessions');
		const { token } = await signIn('ONE@firstpull.test', PASSWORD, '127.0.0.1', null);
		expect((await readSession(token, new Date()))?.actor.organisationId).toBe(one.organisationId);
		const wrong = signIn('one@firstpull.test', 'not the password', '127.0.0.1', null);
		const nobody = signIn('nobody@firstpull.test', PASSWORD, '127.0.0.1', null);
		const messages = await Promise.all(
			[wrong, nobody].map((promise) => promise.catch((error: Error) => error.message))
		);
		expect(messages[0]).toBe(messages[1]);
	});

	it('stores only the hash of a session’s token, slides on, and ends everywhere', async () => {
		const { beginSession, endAllSessions, readSession } = await import('$lib/server/auth/sessions');
		const { listSessions } = await import('$lib/server/repositories/identity');
		const begun = new Date('2026-03-01T06:00:00Z');
		const { token } = await beginSession(one.personId, one.organisationId, null, begun);
		expect((await listSessions(one.personId)).map((row) => row.tokenHash)).not.toContain(token);
		const later = new Date('2026-03-20T06:00:00Z');
		expect((await readSession(token, later))?.renewed?.toISOString()).toBe('2026-04-19T06:00:00.000Z');
		expect(await readSession(token, new Date('2026-04-18T06:00:00Z'))).not.toBeNull();
		expect(await readSession(token, new Date('2026-06-01T06:00:00Z'))).toBeNull();
		const again = await beginSession(one.personId, one.organisationId, null, later);
		await endAllSessions(one.personId);
		expect(await readSession(again.token, later)).toBeNull();
	});

	it('is refused for a while after ten wrong tries', async () => {
		const { signIn } = await import('$lib/server/services/people');
		const tries = [];
		for (let i = 0; i < 11; i++)
			tries.push(await signIn('other@firstpull.test', 'wrong', '10.0.0.9', null).catch((error: unknown) => error));
		expect(tries.at(-1)).toMatchObject({ kind: 'too-many', retryAfterSeconds: expect.any(Number) });
	});
});

describe('API keys', () => {
	it('act with their own role and scopes, and not after they are revoked or expired', async () => {
		const { makeKey, revokeKey } = await import('$lib/server/services/keys');
		const { readApiKey } = await import('$lib/server/auth/api-keys');
		const { addSite } = await import('$lib/server/services/sites');
		const made = await makeKey(one, {
			name: 'gateway',
			role: 'technician',
			scopes: ['logs'],
			siteIds: null,
			expiresAt: '2026-12-31T00:00:00Z'
		});
		const before = new Date('2026-12-30T00:00:00Z');
		const actor = (await readApiKey(made.key, before))?.actor;
		expect(actor).toMatchObject({ role: 'technician', scopes: ['logs'], via: 'key' });
		if (actor)
			await expect(addSite(actor, { name: 'No', timeZone: 'UTC' })).rejects.toMatchObject({ kind: 'forbidden' });
		expect(await readApiKey(made.key, new Date('2027-01-01T00:00:00Z'))).toBeNull();
		await revokeKey(one, made.id);
		expect(await readApiKey(made.key, before)).toBeNull();
	});
});
