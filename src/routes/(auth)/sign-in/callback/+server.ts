import { AppError } from '$lib/model/errors';
import { SESSION_COOKIE } from '$lib/server/auth/sessions';
import { readJourney, signInThroughProvider } from '$lib/server/services/provider-sign-in';
import { JOURNEY_COOKIE, sessionCookie } from '$lib/server/web/cookies';
import { redirect } from '@sveltejs/kit';

const SAID: Readonly<Partial<Record<string, string>>> = { forbidden: 'stranger', unavailable: 'silent' };

/** The browser comes back from the identity provider. */
export const GET = async ({ url, cookies, request }) => {
	const journey = readJourney(cookies.get(JOURNEY_COOKIE));
	cookies.delete(JOURNEY_COOKIE, { path: '/sign-in' });
	if (!journey) redirect(303, '/sign-in?said=slow');
	const came = { state: url.searchParams.get('state'), code: url.searchParams.get('code') };
	try {
		const redirectUri = `${url.origin}/sign-in/callback`;
		const signedIn = await signInThroughProvider(redirectUri, journey, came, request.headers.get('user-agent'));
		cookies.set(SESSION_COOKIE, signedIn.token, sessionCookie(url, signedIn.expiresAt));
	} catch (error) {
		if (!(error instanceof AppError)) throw error;
		redirect(303, `/sign-in?said=${SAID[error.kind] ?? 'provider'}`);
	}
	redirect(303, journey.next);
};
