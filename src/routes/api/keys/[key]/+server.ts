import { revokeKey } from '$lib/server/services/keys';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/people';

export const DELETE = endpoint(operations.revokeKey, ({ actor, params }) => revokeKey(actor, params.key ?? ''));
