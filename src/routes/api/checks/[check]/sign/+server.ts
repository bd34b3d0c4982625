import { signCheck } from '$lib/server/services/checks';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/circle';

export const POST = endpoint(operations.signCheck, ({ actor, params, body, units }) =>
	signCheck(actor, params.check ?? '', body.suspect, units)
);
