import { now } from '$lib/server/config';

/**
 * How the session cookie is set: only over HTTP, only from our own site, and only encrypted where the page is. Its life
 * is given as a length, not an instant, so that a browser whose clock is off keeps it as long.
 */
export function sessionCookie(url: URL, expires: Date) {
	const maxAge = Math.max(0, Math.round((expires.getTime() - now().getTime()) / 1000));
	return { path: '/', httpOnly: true, sameSite: 'lax', secure: url.protocol === 'https:', maxAge } as const;
}

/** What a browser keeps while it is at the identity provider. */
export const JOURNEY_COOKIE = 'firstpull_journey';
const JOURNEY_SECONDS = 600;
export function journeyCookie(url: URL) {
	return {
		path: '/sign-in',
		httpOnly: true,
		sameSite: 'lax',
		secure: url.protocol === 'https:',
		maxAge: JOURNEY_SECONDS
	} as const;
}
