import { planVisit, visitsOf } from '$lib/server/services/visits';
import { endpoint } from '$lib/server/web/endpoint';
import { made } from '$lib/server/web/made';
import * as operations from '$lib/server/web/operations/circle';
import { pageOf } from '$lib/server/web/paging';

export const GET = endpoint(operations.listVisits, async ({ actor, query }) => {
	const { page, nextCursor } = pageOf(await visitsOf(actor, query), query);
	return { visits: page, nextCursor };
});

export const POST = endpoint(operations.planVisit, async ({ actor, body }) => {
	const visit = await planVisit(actor, body);
	return made(visit, `/api/visits/${visit.id}`);
});
