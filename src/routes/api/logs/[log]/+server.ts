import { logShape } from '$lib/server/services/log-shapes';
import { logRowOf, removeLog } from '$lib/server/services/logs';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/logs';

export const GET = endpoint(operations.getLog, async ({ actor, params }) =>
	logShape(await logRowOf(actor, params.log ?? ''))
);
export const DELETE = endpoint(operations.removeLog, ({ actor, params }) => removeLog(actor, params.log ?? ''));
