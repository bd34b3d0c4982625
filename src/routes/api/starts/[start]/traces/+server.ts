import { startTraces as tracesOf } from '$lib/server/services/traces';
import { endpoint } from '$lib/server/web/endpoint';
import { startTraces } from '$lib/server/web/operations/starts';
import { tracesAnswer } from '$lib/server/web/traces-answer';

export const GET = endpoint(startTraces, async ({ actor, params, query, units, event }) =>
	tracesAnswer(event.request, await tracesOf(actor, params.start ?? '', query, units))
);
