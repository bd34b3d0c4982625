import { comparisonOf } from '$lib/server/services/comparison';
import { endpoint } from '$lib/server/web/endpoint';
import { getComparison } from '$lib/server/web/operations/inference';

export const GET = endpoint(getComparison, ({ actor, params, query, units }) =>
	comparisonOf(actor, params.unit ?? '', query, units)
);
