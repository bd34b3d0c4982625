import { confirmMapping } from '$lib/server/services/logs';
import { endpoint } from '$lib/server/web/endpoint';
import { mapLog } from '$lib/server/web/operations/logs';

export const PUT = endpoint(mapLog, ({ actor, params, body }) => confirmMapping(actor, params.log ?? '', body));
