import { nightsOf } from '$lib/server/services/nights';
import { endpoint } from '$lib/server/web/endpoint';
import { getNights } from '$lib/server/web/operations/inference';

export const GET = endpoint(getNights, ({ actor, params, query, units }) =>
	nightsOf(actor, params.unit ?? '', query.circuit, units)
);
