const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);
/** What a form on any page of the web can send without asking first. */
const FORM_TYPES = /^(application\/x-www-form-urlencoded|multipart\/form-data|text\/plain)\b/i;
/** A mail program's one click (RFC 8058) comes from nowhere; it brings its own token and no cookie counts there. */
const ONE_CLICK = /^\/unsubscribe$/;

/** The API key that a program sends; null when there is none. */
export const bearerOf = (headers: Headers): string | null =>
	/^Bearer (\S+)$/i.exec(headers.get('authorization') ?? '')?.[1] ?? null;

/**
 * Does an unsafe request come from another site's page? The framework's own check is this one without its exceptions; it
 * is replaced (svelte.config.js) because it also refuses a mail program's one-click unsubscribe and a program that
 * uploads a multipart log with an API key: neither is believed for a cookie.
 *
 * A browser names the page's origin with every unsafe request. Where none is named, a form is refused, and any other
 * body passes only without the mark that browsers put on requests from elsewhere.
 */
export function isForeign(request: Pick<Request, 'method' | 'headers'>, url: URL): boolean {
	if (SAFE.has(request.method)) return false;
	if (bearerOf(request.headers)) return false;
	if (request.method === 'POST' && ONE_CLICK.test(url.pathname)) return false;
	const origin = request.headers.get('origin');
	if (origin !== null) return origin !== url.origin;
	if (FORM_TYPES.test(request.headers.get('content-type')?.trim() ?? '')) return true;
	const site = request.headers.get('sec-fetch-site');
	return site !== null && site !== 'same-origin';
}
