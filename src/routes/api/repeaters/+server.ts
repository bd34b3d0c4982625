import { repeatersOf } from '$lib/server/services/proof';
import { endpoint } from '$lib/server/web/endpoint';
import { listRepeaters } from '$lib/server/web/operations/inference';

export const GET = endpoint(listRepeaters, ({ actor, query }) => repeatersOf(actor, query));
