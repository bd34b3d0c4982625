import { proofOf } from '$lib/server/services/proof';
import { endpoint } from '$lib/server/web/endpoint';
import { getProof } from '$lib/server/web/operations/inference';

export const GET = endpoint(getProof, ({ actor, params, query, units }) =>
	proofOf(actor, params.unit ?? '', query, units)
);
