import { building } from '$app/environment';
import { AppError } from '$lib/model/errors';
import { readApiKey } from '$lib/server/auth/api-keys';
import { readSession, SESSION_COOKIE } from '$lib/server/auth/sessions';
import { now } from '$lib/server/config';
import { sessionCookie } from '$lib/server/web/cookies';
import { errorResponse } from '$lib/server/web/problem';
import { redirect, type Handle, type HandleServerError } from '@sveltejs/kit';
import { sequence } from '@sveltejs/kit/hooks';

const OPEN = [
	/^\/sign-in/,
	/^\/sign-out/,
	/^\/first-run/,
	/^\/invitation/,
	/^\/reset/,
	/^\/unsubscribe/,
	/^\/healthz$/,
	/^\/readyz$/
];
const OPEN_API = [/^\/api\/openapi\.json$/, /^\/api\/?$/];
const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Finds who asks, from the bearer key or the session cookie. */
const identify: Handle = async ({ event, resolve }) => {
	event.locals.actor = null;
	event.locals.preferences = { units: 'ip', paper: 'system' };
	event.locals.requestId = crypto.randomUUID();
	if (building) return resolve(event);
	const bearer = /^Bearer (\S+)$/i.exec(event.request.headers.get('authorization') ?? '')?.[1];
	const token = event.cookies.get(SESSION_COOKIE);
	const found = bearer ? await readApiKey(bearer, now()) : token ? await readSession(token, now()) : null;
	if (found) {
		event.locals.actor = found.actor;
		event.locals.preferences = found.preferences;
		if ('renewed' in found && found.renewed && token) {
			event.cookies.set(SESSION_COOKIE, token, sessionCookie(event.url, found.renewed as Date));
		}
	}
	return resolve(event);
};

/** Pages and calls that need a person; unsafe calls by cookie must come from our own pages. */
const guard: Handle = async ({ event, resolve }) => {
	const { pathname } = event.url;
	if (pathname.startsWith('/api')) {
		const open = OPEN_API.some((pattern) => pattern.test(pathname));
		const actor = event.locals.actor;
		if (!actor && !open)
			return errorResponse(new AppError('unauthenticated', 'Sign in, or send an API key as a bearer token.'));
		const foreign = actor?.via === 'session' && !SAFE.has(event.request.method) && !fromHere(event.request, event.url);
		if (foreign) return errorResponse(new AppError('forbidden', 'This call came from another site.'));
		return resolve(event);
	}
	const open = pathname === '/metrics' || OPEN.some((pattern) => pattern.test(pathname));
	if (!event.locals.actor && !open && event.route.id !== null) {
		redirect(303, pathname === '/' ? '/sign-in' : `/sign-in?next=${encodeURIComponent(pathname + event.url.search)}`);
	}
	return resolve(event);
};

function fromHere(request: Request, url: URL): boolean {
	const origin = request.headers.get('origin');
	if (origin) return origin === url.origin;
	// A server load's own fetch carries neither header; a browser always sends one of them with an unsafe call.
	const site = request.headers.get('sec-fetch-site');
	return site === null || site === 'same-origin';
}

/** Headers that every answer carries, and the chosen paper before the first paint. */
const dress: Handle = async ({ event, resolve }) => {
	const { paper } = event.locals.preferences;
	const response = await resolve(event, {
		transformPageChunk: ({ html }) => html.replace('data-paper="system"', `data-paper="${paper}"`),
		preload: ({ type, path }) =>
			type === 'js' || type === 'css' || (type === 'font' && path.includes('latin-wght-normal'))
	});
	try {
		response.headers.set('x-content-type-options', 'nosniff');
		response.headers.set('referrer-policy', 'same-origin');
		response.headers.set('permissions-policy', 'camera=(self), geolocation=(), microphone=()');
		response.headers.set('cross-origin-opener-policy', 'same-origin');
		if (event.url.protocol === 'https:') response.headers.set('strict-transport-security', 'max-age=31536000');
	} catch {
		// A redirect's headers are sealed; it shows nothing that needs them.
	}
	return response;
};

export const handle = sequence(identify, guard, dress);

export const handleError: HandleServerError = ({ error, event, status }) => {
	if (error instanceof AppError) return { message: error.message };
	if (status === 404) return { message: 'There is no such page.' };
	console.error(event.locals.requestId, event.request.method, event.url.pathname, error);
	return { message: 'Something went wrong here.', detail: `Note this number for support: ${event.locals.requestId}` };
};
