import { weekPlan } from '$lib/server/services/visits';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/circle';

export const GET = endpoint(operations.visitPlan, async ({ actor, query }) => ({
	rows: await weekPlan(actor, query.from, query.to)
}));
