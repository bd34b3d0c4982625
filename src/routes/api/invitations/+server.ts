import { withdrawInvitation } from '$lib/server/services/members';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const DELETE = endpoint(operations.withdrawInvitation, ({ actor, body }) =>
	withdrawInvitation(actor, body.email)
);
