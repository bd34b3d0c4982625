import { copyToTwin } from '$lib/server/services/twin';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const POST = endpoint(operations.copyTwin, ({ actor, params, body: { from, ...parts } }) =>
	copyToTwin(actor, from, params.unit ?? '', parts)
);
