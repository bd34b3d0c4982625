import { auditOf } from '$lib/server/services/office';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const GET = endpoint(operations.listAudit, async ({ actor, query }) => ({ lines: await auditOf(actor, query) }));
