import { keysOf, makeKey } from '$lib/server/services/keys';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/people';

export const GET = endpoint(operations.listKeys, async ({ actor }) => ({ keys: await keysOf(actor) }));
export const POST = endpoint(operations.addKey, ({ actor, body }) => makeKey(actor, body));
