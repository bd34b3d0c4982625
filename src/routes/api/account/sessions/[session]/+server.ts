import { endOwnSession } from '$lib/server/services/account';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const DELETE = endpoint(operations.endSession, ({ actor, params }) =>
	endOwnSession(actor, params.session ?? '')
);
