import { unitTraces as tracesOf } from '$lib/server/services/traces';
import { endpoint } from '$lib/server/web/endpoint';
import { unitTraces } from '$lib/server/web/operations/starts';
import { tracesAnswer } from '$lib/server/web/traces-answer';

export const GET = endpoint(unitTraces, async ({ actor, params, query, units, event }) =>
	tracesAnswer(event.request, await tracesOf(actor, params.unit ?? '', query, units))
);
