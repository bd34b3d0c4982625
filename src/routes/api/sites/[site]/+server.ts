import { changeSite, removeSite, siteOf } from '$lib/server/services/sites';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/plant';

export const GET = endpoint(operations.getSite, ({ actor, params }) => siteOf(actor, params.site ?? ''));
export const PATCH = endpoint(operations.changeSite, ({ actor, params, body }) =>
	changeSite(actor, params.site ?? '', body)
);
export const DELETE = endpoint(operations.removeSite, ({ actor, params }) => removeSite(actor, params.site ?? ''));
