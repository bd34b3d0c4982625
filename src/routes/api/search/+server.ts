import { search } from '$lib/server/services/search';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const GET = endpoint(operations.search, async ({ actor, query }) => ({ hits: await search(actor, query.q) }));
