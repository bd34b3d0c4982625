/// <reference types="@sveltejs/kit" />
/// <reference no-default-lib="true"/>
/// <reference lib="esnext" />
/// <reference lib="webworker" />
import { build, files, version } from '$service-worker';

/**
 * Keeps the shell and what was seen, so that a plant room without a connection still shows the unit, the brief and the
 * check forms. What a person recorded is not here: the pages keep it in their own store until the server has it.
 */

const worker = globalThis.self as unknown as ServiceWorkerGlobalScope;
const SHELL = `shell ${version}`;
/** Pages and answers of the person who is signed in; emptied at every sign-in and sign-out. */
const SEEN = 'seen';
const MOST_SEEN = 300;
/** A connection that gives nothing for this long is treated as none, when something is kept. */
const PATIENCE_MS = 6000;

worker.addEventListener('install', (event) => {
	event.waitUntil(
		caches
			.open(SHELL)
			.then((cache) => cache.addAll([...build, ...files]))
			.then(() => worker.skipWaiting())
	);
});

worker.addEventListener('activate', (event) => {
	event.waitUntil(
		caches
			.keys()
			.then((names) =>
				Promise.all(names.filter((name) => name !== SHELL && name !== SEEN).map((name) => caches.delete(name)))
			)
			.then(() => worker.clients.claim())
	);
});

/** Addresses whose answers are worth keeping: pages, their data, and the API's plain reading calls. */
function isKept(url: URL): boolean {
	if (
		/^\/(sign-in|sign-out|first-run|invitation|reset|unsubscribe|office|account|healthz|readyz|metrics)/.test(
			url.pathname
		)
	)
		return false;
	if (/^\/api\/(account|audit|invitations|jobs|keys|mails|members|office|search)\b/.test(url.pathname)) return false;
	if (!url.pathname.startsWith('/api/')) return true;
	return !/\/(progress|original|export)$/.test(url.pathname);
}

async function trim(cache: Cache): Promise<void> {
	const keys = await cache.keys();
	for (const key of keys.slice(0, Math.max(0, keys.length - MOST_SEEN))) await cache.delete(key);
}

async function keep(request: Request, answer: Response): Promise<void> {
	const cache = await caches.open(SEEN);
	// The newest goes last, so that the oldest is the first to leave.
	await cache.delete(request);
	await cache.put(request, answer);
	await trim(cache);
}

function patience(): Promise<never> {
	return new Promise((_done, fail) => setTimeout(() => fail(new Error('no answer in time')), PATIENCE_MS));
}

/** The network first; what was seen when there is none. */
async function fresh(event: FetchEvent): Promise<Response> {
	const { request } = event;
	const cache = await caches.open(SEEN);
	const kept = await cache.match(request);
	const asked = fetch(request).then((answer) => {
		const plain = answer.ok && !answer.redirected && answer.type === 'basic';
		if (plain) event.waitUntil(keep(request, answer.clone()));
		return answer;
	});
	try {
		return await (kept ? Promise.race([asked, patience()]) : asked);
	} catch (error) {
		asked.catch(() => undefined);
		if (kept) return kept;
		if (request.mode === 'navigate') return noConnection();
		throw error;
	}
}

/** The page for an address that was never seen with a connection. */
function noConnection(): Response {
	const words = `<!doctype html><html lang="en"><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<title>No connection · Firstpull</title>
<body style="font:16px/1.5 system-ui,sans-serif;max-width:34em;margin:3em auto;padding:0 16px;background:#f4f6f1;color:#17211e">
<h1 style="font-size:1.3em">No connection, and this sheet was not seen before</h1>
<p>Go back to a sheet you had open: units, briefs and check forms that were seen stay on this device.
What you recorded is kept and is sent when the connection is back.</p></body></html>`;
	return new Response(words, { status: 503, headers: { 'content-type': 'text/html; charset=utf-8' } });
}

worker.addEventListener('fetch', (event) => {
	const { request } = event;
	const url = new URL(request.url);
	if (url.origin !== worker.location.origin) return;
	const entry = request.method === 'POST' && /^\/sign-(in|out)/.test(url.pathname);
	const other = request.method === 'PUT' && url.pathname === '/api/account/office';
	if (entry || other || url.pathname === '/sign-in/callback') {
		// Another person, or the same one in another office, must not find what was seen before.
		event.waitUntil(caches.delete(SEEN));
		return;
	}
	if (request.method !== 'GET') return;
	if (build.includes(url.pathname) || files.includes(url.pathname)) {
		event.respondWith(caches.match(request).then((kept) => kept ?? fetch(request)));
		return;
	}
	if (isKept(url)) event.respondWith(fresh(event));
});
