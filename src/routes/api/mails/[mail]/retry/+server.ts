import { retryMail } from '$lib/server/services/mails';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const POST = endpoint(operations.retryMail, ({ actor, params }) => retryMail(actor, params.mail ?? ''));
