import { AppError } from '$lib/model/errors';
import { config } from '$lib/server/config';
import { CodeChallengeMethod, generateCodeVerifier, generateState, OAuth2Client } from 'arctic';
import { createRemoteJWKSet, jwtVerify, type JWTPayload } from 'jose';
import { z } from 'zod';

/**
 * Sign-in through an identity provider by OpenID Connect: authorisation code with PKCE, state and nonce; the id token's
 * signature, issuer, audience and times are verified against the provider's published keys.
 */

const discoverySchema = z.object({
	issuer: z.string(),
	authorization_endpoint: z.url(),
	token_endpoint: z.url(),
	jwks_uri: z.url()
});
type Provider = z.infer<typeof discoverySchema> & { keys: ReturnType<typeof createRemoteJWKSet> };

const TIMEOUT = 10_000;
/** Signatures that only the provider can make; never `none` or a shared secret. */
const ALGORITHMS = ['RS256', 'RS384', 'RS512', 'PS256', 'PS384', 'PS512', 'ES256', 'ES384', 'EdDSA'];
const known = new Map<string, Promise<Provider>>();

/** Is there an identity provider? */
export const hasProvider = (): boolean => Boolean(config().OIDC_ISSUER && config().OIDC_CLIENT_ID);

async function discover(issuer: string): Promise<Provider> {
	const answer = await fetch(`${issuer.replace(/\/$/, '')}/.well-known/openid-configuration`, {
		signal: AbortSignal.timeout(TIMEOUT)
	});
	if (!answer.ok) throw new Error(`the provider answered ${answer.status}`);
	const found = discoverySchema.parse(await answer.json());
	if (found.issuer.replace(/\/$/, '') !== issuer.replace(/\/$/, ''))
		throw new Error('the provider names another issuer');
	return { ...found, keys: createRemoteJWKSet(new URL(found.jwks_uri)) };
}

function provider(): Promise<Provider> {
	const issuer = config().OIDC_ISSUER ?? '';
	const kept = known.get(issuer);
	if (kept) return kept;
	const asked = discover(issuer).catch((error: unknown) => {
		known.delete(issuer);
		throw new AppError(
			'unavailable',
			`The identity provider does not answer: ${error instanceof Error ? error.message : ''}`
		);
	});
	known.set(issuer, asked);
	return asked;
}

const client = (redirect: string): OAuth2Client =>
	new OAuth2Client(config().OIDC_CLIENT_ID ?? '', config().OIDC_CLIENT_SECRET ?? null, redirect);

/** What the browser keeps between leaving and coming back. */
export type Journey = { state: string; verifier: string; nonce: string; next: string };

/** Where the browser goes to sign in, and what it must bring back. */
export async function beginJourney(redirect: string, next: string): Promise<{ url: URL; journey: Journey }> {
	const { authorization_endpoint } = await provider();
	const journey = { state: generateState(), verifier: generateCodeVerifier(), nonce: generateState(), next };
	const url = client(redirect).createAuthorizationURLWithPKCE(
		authorization_endpoint,
		journey.state,
		CodeChallengeMethod.S256,
		journey.verifier,
		['openid', 'email', 'profile']
	);
	url.searchParams.set('nonce', journey.nonce);
	return { url, journey };
}

export type Identity = { subject: string; email: string | null; emailVerified: boolean; name: string | null };

/**
 * Verifies an id token: signature by a published key, issuer, audience, expiry, and the nonce of this journey.
 * @throws Error (of jose, or for the nonce) when any of them is wrong
 */
export async function verifyIdToken(token: string, nonce: string): Promise<Identity> {
	const { issuer, keys } = await provider();
	const { payload } = await jwtVerify<
		JWTPayload & { nonce?: string; azp?: string; email?: string; email_verified?: boolean; name?: string }
	>(token, keys, {
		issuer,
		audience: config().OIDC_CLIENT_ID ?? '',
		algorithms: ALGORITHMS,
		requiredClaims: ['sub', 'exp', 'iat']
	});
	// OpenID Connect Core 3.1.3.7: a token for several audiences names the one it was issued to.
	if (Array.isArray(payload.aud) && payload.aud.length > 1 && payload.azp !== config().OIDC_CLIENT_ID)
		throw new Error('the token was issued to another client');
	if (payload.nonce !== nonce) throw new Error('the nonce is another one');
	return {
		subject: `${issuer} ${payload.sub ?? ''}`,
		email: payload.email?.toLowerCase() ?? null,
		emailVerified: payload.email_verified === true,
		name: payload.name ?? null
	};
}

/** Who came back. @throws AppError `unauthenticated` when state, code or token do not hold */
export async function endJourney(
	redirect: string,
	journey: Journey,
	came: { state: string | null; code: string | null }
): Promise<Identity> {
	const { token_endpoint } = await provider();
	const refused = (): AppError =>
		new AppError('unauthenticated', 'The sign-in through the identity provider did not hold. Begin again.');
	if (!came.code || came.state !== journey.state) throw refused();
	try {
		const tokens = await client(redirect).validateAuthorizationCode(token_endpoint, came.code, journey.verifier);
		return await verifyIdToken(tokens.idToken(), journey.nonce);
	} catch (error) {
		console.error('identity provider', error instanceof Error ? error.message : error);
		throw refused();
	}
}
