import { building } from '$app/environment';
import { AppError } from '$lib/model/errors';
import { readApiKey } from '$lib/server/auth/api-keys';
import { readSession, SESSION_COOKIE } from '$lib/server/auth/sessions';
import { now } from '$lib/server/config';
import { letGo } from '$lib/server/services/health';
import { sessionCookie } from '$lib/server/web/cookies';
import { bearerOf, isForeign } from '$lib/server/web/foreign';
import { errorResponse } from '$lib/server/web/problem';
import { redirect, type Handle, type HandleServerError } from '@sveltejs/kit';
import { sequence } from '@sveltejs/kit/hooks';

// adapter-node has served its last request then; what still holds the process are the pools.
if (!building) process.once('sveltekit:shutdown', () => void letGo());

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
/** Where an owner may go who has to set up two-step sign-in first. */
const WHILE_DUE = /^\/(account|sign-out|api\/(me|account))(\/|$)/;

/** Refuses what another site's page sends in our person's name. */
const refuseForeign: Handle = ({ event, resolve }) => {
	if (building || !isForeign(event.request, event.url)) return resolve(event);
	return errorResponse(new AppError('forbidden', 'This call came from another site.'));
};

/** Finds who asks, from the bearer key or the session cookie. */
const identify: Handle = async ({ event, resolve }) => {
	event.locals.actor = null;
	event.locals.preferences = { units: 'ip', paper: 'system' };
	event.locals.requestId = crypto.randomUUID();
	event.locals.twoStepDue = false;
	if (building) return resolve(event);
	const bearer = bearerOf(event.request.headers);
	if (bearer) {
		const found = await readApiKey(bearer, now());
		event.locals.actor = found?.actor ?? null;
		event.locals.preferences = found?.preferences ?? event.locals.preferences;
		return resolve(event);
	}
	const token = event.cookies.get(SESSION_COOKIE);
	const found = token ? await readSession(token, now()) : null;
	if (token && found) {
		event.locals.actor = found.actor;
		event.locals.preferences = found.preferences;
		event.locals.twoStepDue = found.twoStepDue;
		if (found.renewed) event.cookies.set(SESSION_COOKIE, token, sessionCookie(event.url, found.renewed));
	}
	return resolve(event);
};

/** Pages and calls that need a person, and an owner's second step where the office asks for it. */
const guard: Handle = async ({ event, resolve }) => {
	const { pathname } = event.url;
	const { actor } = event.locals;
	const due = event.locals.twoStepDue && !WHILE_DUE.test(pathname);
	if (pathname.startsWith('/api')) {
		const open = OPEN_API.some((pattern) => pattern.test(pathname));
		if (!actor && !open)
			return errorResponse(new AppError('unauthenticated', 'Sign in, or send an API key as a bearer token.'));
		if (due)
			return errorResponse(new AppError('forbidden', 'Owners of this office need two-step sign-in: set it up first.'));
		return resolve(event);
	}
	if (due && event.route.id !== null) redirect(303, '/account?due=two-step');
	const open = pathname === '/metrics' || OPEN.some((pattern) => pattern.test(pathname));
	if (!actor && !open && event.route.id !== null) {
		redirect(303, pathname === '/' ? '/sign-in' : `/sign-in?next=${encodeURIComponent(pathname + event.url.search)}`);
	}
	return resolve(event);
};

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

export const handle = sequence(refuseForeign, identify, guard, dress);

export const handleError: HandleServerError = ({ error, event, status }) => {
	if (error instanceof AppError) return { message: error.message };
	if (status === 404) return { message: 'There is no such page.' };
	console.error(event.locals.requestId, event.request.method, event.url.pathname, error);
	return { message: 'Something went wrong here.', detail: `Note this number for support: ${event.locals.requestId}` };
};
