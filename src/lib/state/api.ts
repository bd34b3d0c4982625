import type { Problem } from '$lib/model/wire/common';

/** A refusal of the API, with its problem details (RFC 9457) when it sent them. */
export class ApiError extends Error {
	readonly status: number;
	readonly problem: Problem;

	constructor(problem: Problem) {
		super(problem.detail ?? problem.title);
		this.name = 'ApiError';
		this.status = problem.status;
		this.problem = problem;
	}
}

/** The problem details of an answer; an answer without any gets its status as words. */
export async function problemOf(answer: Response): Promise<Problem> {
	const fallback = { type: 'about:blank', title: `The server answered ${answer.status}`, status: answer.status };
	try {
		const body: unknown = await answer.json();
		if (typeof body === 'object' && body !== null && 'title' in body) return { ...fallback, ...(body as Problem) };
	} catch {
		// No JSON: the status is all there is to say.
	}
	return fallback;
}

/**
 * GET a JSON answer of our own API. The caller names the wire type: client and server are built from the same schemas.
 * @throws ApiError on a refusal, TypeError when there is no connection
 */
export async function getJson<T>(fetcher: typeof fetch, path: string): Promise<T> {
	const answer = await fetcher(path, { headers: { accept: 'application/json' } });
	if (!answer.ok) throw new ApiError(await problemOf(answer));
	return (await answer.json()) as T;
}

/** A call that takes longer has lost its connection: the form says so, and keeps what was typed. */
const MOST_MS = 60_000;

/**
 * An unsafe call with a JSON body; an empty answer gives undefined.
 * @throws ApiError on a refusal, TypeError or DOMException when there is no connection or no answer within a minute
 */
export async function sendJson<T = undefined>(
	method: 'POST' | 'PUT' | 'PATCH' | 'DELETE',
	path: string,
	body?: unknown
): Promise<T> {
	const answer = await fetch(path, {
		method,
		headers: { accept: 'application/json', ...(body === undefined ? {} : { 'content-type': 'application/json' }) },
		body: body === undefined ? undefined : JSON.stringify(body),
		signal: AbortSignal.timeout(MOST_MS)
	});
	if (!answer.ok) throw new ApiError(await problemOf(answer));
	if (answer.status === 204 || answer.headers.get('content-length') === '0') return undefined as T;
	return (await answer.json()) as T;
}

/** A path with the query fields that have a value. */
export function pathWith(path: string, fields: Readonly<Record<string, string | null | undefined>>): string {
	const query = new URLSearchParams();
	for (const [key, value] of Object.entries(fields)) if (value) query.set(key, value);
	const text = query.toString();
	return text === '' ? path : `${path}?${text}`;
}
