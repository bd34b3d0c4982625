import { exportJWK, generateKeyPair, SignJWT, type JWTPayload } from 'jose';
import { OAuth2Server } from 'oauth2-mock-server';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Journey } from '$lib/server/auth/provider';
import { useFreshDatabase } from './support/fresh';
import { invitedOffice, type Office } from './support/office';

// Invented people; the provider is a local fake that signs with keys of its own.
useFreshDatabase();
const CLIENT = 'firstpull-test';
const BACK = 'https://firstpull.test/sign-in/callback';
const server = new OAuth2Server();
let office: Office;
let claims: Record<string, unknown> = {};

beforeAll(async () => {
	await server.issuer.keys.generate('RS256');
	await server.start(0, '127.0.0.1');
	process.env.OIDC_ISSUER = server.issuer.url ?? '';
	process.env.OIDC_CLIENT_ID = CLIENT;
	process.env.OIDC_CLIENT_SECRET = 'invented';
	server.service.on('beforeTokenSigning', (token: { payload: JWTPayload }) => {
		Object.assign(token.payload, claims);
	});
	office = await invitedOffice();
});
afterAll(() => server.stop());

/** Goes to the provider as a browser does, and comes back with what it gives. */
async function goThere(): Promise<{ journey: Journey; came: { state: string | null; code: string | null } }> {
	const { beginJourney } = await import('$lib/server/auth/provider');
	const { url, journey } = await beginJourney(BACK, '/units');
	expect(url.searchParams.get('code_challenge_method')).toBe('S256');
	const answer = await fetch(url, { redirect: 'manual' });
	const back = new URL(answer.headers.get('location') ?? '');
	return { journey, came: { state: back.searchParams.get('state'), code: back.searchParams.get('code') } };
}
async function comeBack(journey: Journey, came: { state: string | null; code: string | null }) {
	const { signInThroughProvider } = await import('$lib/server/services/provider-sign-in');
	return signInThroughProvider(BACK, journey, came, 'a browser');
}

describe('sign-in through the provider', () => {
	it('signs in the member whose address the provider has verified, and knows them by their subject from then on', async () => {
		const { readSession } = await import('$lib/server/auth/sessions');
		claims = { sub: 'abc', email: 'Engineer@office.test', email_verified: true };
		const first = await goThere();
		const { token } = await comeBack(first.journey, first.came);
		expect((await readSession(token, new Date()))?.actor.personId).toBe(office.engineer.personId);
		claims = { sub: 'abc', email: 'renamed@else.test', email_verified: false };
		const again = await goThere();
		const second = await comeBack(again.journey, again.came);
		expect((await readSession(second.token, new Date()))?.actor.personId).toBe(office.engineer.personId);
	});

	it('signs in nobody by an address that is not verified, unknown, or tied to another subject', async () => {
		for (const other of [
			{ sub: 'def', email: 'manager@office.test', email_verified: false },
			{ sub: 'def', email: 'manager@office.test' },
			{ sub: 'ghi', email: 'nobody@office.test', email_verified: true },
			{ sub: 'jkl', email: 'engineer@office.test', email_verified: true }
		]) {
			claims = other;
			const { journey, came } = await goThere();
			await expect(comeBack(journey, came), JSON.stringify(other)).rejects.toMatchObject({ kind: 'forbidden' });
		}
	});

	it('refuses another state, a code without its verifier, and no code', async () => {
		claims = { sub: 'abc', email: 'engineer@office.test', email_verified: true };
		const { journey, came } = await goThere();
		const refused = { kind: 'unauthenticated' };
		await expect(comeBack(journey, { ...came, state: 'another' })).rejects.toMatchObject(refused);
		await expect(comeBack(journey, { ...came, code: null })).rejects.toMatchObject(refused);
		await expect(comeBack({ ...journey, nonce: 'another' }, came)).rejects.toMatchObject(refused);
		const other = await goThere();
		const foreign = { ...other.journey, verifier: journey.verifier };
		await expect(comeBack(foreign, other.came)).rejects.toMatchObject(refused);
	});
});

describe('an id token', () => {
	const NONCE = 'nonce-of-this-journey';
	const good = (): JWTPayload => ({ sub: 'abc', nonce: NONCE, email: 'e@office.test', email_verified: true });
	type Over = { issuer?: string; audience?: string | string[]; expires?: string; payload?: JWTPayload };

	async function signed(over: Over = {}, foreignKey = false): Promise<string> {
		const [own] = server.issuer.keys.toJSON(true);
		const key = foreignKey
			? (await generateKeyPair('RS256')).privateKey
			: await (await import('jose')).importJWK(own as never, 'RS256');
		return new SignJWT(over.payload ?? good())
			.setProtectedHeader({ alg: 'RS256', kid: own?.kid ?? '' })
			.setIssuer(over.issuer ?? server.issuer.url ?? '')
			.setAudience(over.audience ?? CLIENT)
			.setIssuedAt('-2m')
			.setExpirationTime(over.expires ?? '5m')
			.sign(key);
	}
	async function verify(token: string) {
		const { verifyIdToken } = await import('$lib/server/auth/provider');
		return verifyIdToken(token, NONCE);
	}

	it('of the provider, for us, in time and of this journey is taken', async () => {
		expect(await verify(await signed())).toMatchObject({ email: 'e@office.test', emailVerified: true });
		const two = { audience: [CLIENT, 'other'], payload: { ...good(), azp: CLIENT } };
		expect(await verify(await signed(two))).toMatchObject({ email: 'e@office.test' });
	});

	it('signed by another key is refused, also under the name of ours', async () => {
		await expect(verify(await signed({}, true))).rejects.toThrow(/signature/);
	});

	it('that is unsigned, or signed with a shared secret, is refused', async () => {
		const part = (value: object): string => Buffer.from(JSON.stringify(value)).toString('base64url');
		const body = part({ ...good(), iss: server.issuer.url, aud: CLIENT, iat: 1, exp: 9_999_999_999 });
		await expect(verify(`${part({ alg: 'none' })}.${body}.`)).rejects.toThrow();
		// The published key taken for a shared secret: the oldest trick on a verifier that believes the header.
		const [own] = server.issuer.keys.toJSON(false);
		const secret = Buffer.from(JSON.stringify(await exportJWK(own as never).catch(() => own)));
		const shared = await new SignJWT(good())
			.setProtectedHeader({ alg: 'HS256', kid: own?.kid ?? '' })
			.setIssuer(server.issuer.url ?? '')
			.setAudience(CLIENT)
			.setIssuedAt()
			.setExpirationTime('5m')
			.sign(secret);
		await expect(verify(shared)).rejects.toThrow(/alg/);
	});

	it('with a wrong nonce, expired, for another audience or of another issuer is refused', async () => {
		await expect(verify(await signed({ payload: { ...good(), nonce: 'another' } }))).rejects.toThrow(/nonce/);
		await expect(verify(await signed({ payload: { sub: 'abc' } }))).rejects.toThrow(/nonce/);
		await expect(verify(await signed({ expires: '-1m' }))).rejects.toThrow(/exp/);
		await expect(verify(await signed({ audience: 'other' }))).rejects.toThrow(/aud/);
		await expect(verify(await signed({ audience: [CLIENT, 'other'] }))).rejects.toThrow(/another client/);
		await expect(verify(await signed({ issuer: 'https://else.test' }))).rejects.toThrow(/iss/);
	});
});
