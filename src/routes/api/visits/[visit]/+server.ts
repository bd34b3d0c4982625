import { cancelVisit, changeVisit, visitOf } from '$lib/server/services/visits';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/circle';

export const GET = endpoint(operations.getVisit, ({ actor, params }) => visitOf(actor, params.visit ?? ''));
export const PATCH = endpoint(operations.changeVisit, ({ actor, params, body }) =>
	changeVisit(actor, params.visit ?? '', body)
);
export const DELETE = endpoint(operations.cancelVisit, ({ actor, params }) => cancelVisit(actor, params.visit ?? ''));
