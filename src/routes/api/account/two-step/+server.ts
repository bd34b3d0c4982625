import { beginTwoStep, confirmTwoStep, endTwoStep } from '$lib/server/services/two-step';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const POST = endpoint(operations.beginTwoStep, ({ actor, body }) => beginTwoStep(actor, body.password));
export const PUT = endpoint(operations.confirmTwoStep, ({ actor, body }) => confirmTwoStep(actor, body.code));
export const DELETE = endpoint(operations.endTwoStep, ({ actor, body }) => endTwoStep(actor, body.password));
