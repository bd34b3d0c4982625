import { suspectsOf } from '$lib/server/services/suspects';
import { endpoint } from '$lib/server/web/endpoint';
import { getSuspects } from '$lib/server/web/operations/starts';

export const GET = endpoint(getSuspects, ({ actor, params, query, units }) =>
	suspectsOf(actor, params.unit ?? '', query, units)
);
