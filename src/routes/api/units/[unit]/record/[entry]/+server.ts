import { removeNoted } from '$lib/server/services/noted';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/starts';

export const DELETE = endpoint(operations.removeNoted, ({ actor, params }) =>
	removeNoted(actor, params.unit ?? '', params.entry ?? '')
);
