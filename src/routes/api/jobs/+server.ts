import { jobsOf } from '$lib/server/services/office';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const GET = endpoint(operations.listJobs, async ({ actor }) => ({ jobs: await jobsOf(actor) }));
