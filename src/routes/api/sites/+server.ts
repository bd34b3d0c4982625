import { addSite, sitesOf } from '$lib/server/services/sites';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/plant';
import { pageOf } from '$lib/server/web/paging';

export const GET = endpoint(operations.listSites, async ({ actor, query }) => {
	const { page, nextCursor } = pageOf(await sitesOf(actor), query);
	return { sites: page, nextCursor };
});

export const POST = endpoint(operations.addSite, ({ actor, body }) => addSite(actor, body));
