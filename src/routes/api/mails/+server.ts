import { mailsOf } from '$lib/server/services/mails';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const GET = endpoint(operations.listMails, async ({ actor }) => ({ mails: await mailsOf(actor) }));
