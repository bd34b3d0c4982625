import { changeUnit, removeUnit, unitOf } from '$lib/server/services/units';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/plant';

export const GET = endpoint(operations.getUnit, ({ actor, params }) => unitOf(actor, params.unit ?? ''));
export const PATCH = endpoint(operations.changeUnit, ({ actor, params, body }) =>
	changeUnit(actor, params.unit ?? '', body)
);
export const DELETE = endpoint(operations.removeUnit, ({ actor, params }) => removeUnit(actor, params.unit ?? ''));
