import { previewShape } from '$lib/server/services/log-shapes';
import { logRowOf } from '$lib/server/services/logs';
import { endpoint } from '$lib/server/web/endpoint';
import { previewLog } from '$lib/server/web/operations/logs';

export const GET = endpoint(previewLog, async ({ actor, params }) =>
	previewShape(await logRowOf(actor, params.log ?? ''))
);
