import { AppError } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import { demand } from '$lib/server/auth/guard';
import { answerOnce } from '$lib/server/services/idempotency';
import type { RequestEvent } from '@sveltejs/kit';
import type { z } from 'zod';
import type { Operation } from './operation';
import { errorResponse, invalid } from './problem';

type Parsed<S> = S extends z.ZodType ? z.output<S> : undefined;

export type Call<O extends Operation> = {
	event: RequestEvent;
	actor: Actor;
	params: Record<string, string>;
	query: Parsed<O['query']>;
	body: Parsed<O['body']>;
	/** `?units=ip`; SI unless asked. */
	units: UnitSystem;
};

const MOST_JSON = 2 * 1024 * 1024;

/** Who asks, or a 401. */
export function actorOf(event: RequestEvent): Actor {
	if (!event.locals.actor) throw new AppError('unauthenticated', 'Sign in, or send an API key as a bearer token.');
	return event.locals.actor;
}

async function jsonBody(event: RequestEvent): Promise<unknown> {
	const text = await event.request.text();
	if (text.length > MOST_JSON) throw new AppError('too-large', 'The body is over 2 MiB.');
	if (text.trim() === '') return {};
	try {
		return JSON.parse(text);
	} catch {
		throw new AppError('invalid', 'The body is not JSON.');
	}
}

function parsed<S extends z.ZodType>(schema: S | undefined, value: unknown, what: string): Parsed<S> {
	if (!schema) return undefined as Parsed<S>;
	const result = schema.safeParse(value);
	if (!result.success) throw invalid(result.error, what);
	return result.data as Parsed<S>;
}

function unitsOf(event: RequestEvent): UnitSystem {
	const units = event.url.searchParams.get('units') ?? 'si';
	if (units !== 'si' && units !== 'ip')
		throw new AppError('invalid', 'units is si or ip.', { errors: [{ field: 'units', message: 'si or ip' }] });
	return units;
}

/** A uuid in the path that is none cannot name anything that exists. */
function idsOf(params: Partial<Record<string, string>>): Record<string, string> {
	const uuid = /^[0-9a-f]{8}-([0-9a-f]{4}-){3}[0-9a-f]{12}$/i;
	const ids: Record<string, string> = {};
	for (const [name, value] of Object.entries(params)) {
		if (value === undefined) continue;
		if (!uuid.test(value)) throw new AppError('not-found', `There is no such ${name}.`);
		ids[name] = value;
	}
	return ids;
}

/**
 * A route of the public API: finds who asks, checks the right, validates what came with the very schemas that the
 * OpenAPI document shows, honours an Idempotency-Key, and turns errors into problem details. `handle` gives the
 * answer's body (sent as JSON, 204 for undefined) or a whole Response.
 */
export function endpoint<O extends Operation>(operation: O, handle: (call: Call<O>) => Promise<unknown>) {
	return async (event: RequestEvent): Promise<Response> => {
		try {
			const actor = actorOf(event);
			demand(actor, operation.right);
			const query = parsed(operation.query, Object.fromEntries(event.url.searchParams), 'query') as Parsed<O['query']>;
			const body = (operation.body ? parsed(operation.body, await jsonBody(event), 'body') : undefined) as Parsed<
				O['body']
			>;
			const call: Call<O> = { event, actor, params: idsOf(event.params), query, body, units: unitsOf(event) };
			const answer = () => responseOf(handle(call), operation.status ?? 200);
			const key = operation.method === 'get' ? null : event.request.headers.get('idempotency-key');
			return await (key ? answerOnce(actor, key, `${operation.method} ${event.url.pathname}`, answer) : answer());
		} catch (error) {
			if (!(error instanceof AppError)) console.error(event.locals.requestId, error);
			return errorResponse(error);
		}
	};
}

async function responseOf(result: Promise<unknown>, status: number): Promise<Response> {
	const body = await result;
	if (body instanceof Response) return body;
	if (body === undefined) return new Response(null, { status: 204 });
	return new Response(JSON.stringify(body), {
		status,
		headers: { 'content-type': 'application/json', 'cache-control': 'no-store' }
	});
}
