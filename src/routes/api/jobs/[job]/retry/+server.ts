import { retryOfficeJob } from '$lib/server/services/office';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const POST = endpoint(operations.retryJob, ({ actor, params }) => retryOfficeJob(actor, params.job ?? ''));
