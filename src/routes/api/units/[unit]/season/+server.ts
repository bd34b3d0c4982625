import { seasonOf } from '$lib/server/services/season';
import { endpoint } from '$lib/server/web/endpoint';
import { getSeason } from '$lib/server/web/operations/inference';

export const GET = endpoint(getSeason, ({ actor, params, query, units }) =>
	seasonOf(actor, params.unit ?? '', query.circuit, units)
);
