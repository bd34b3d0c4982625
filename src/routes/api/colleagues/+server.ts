import { colleaguesOf } from '$lib/server/services/people';
import { endpoint } from '$lib/server/web/endpoint';
import { listColleagues } from '$lib/server/web/operations/circle';

export const GET = endpoint(listColleagues, async ({ actor }) => ({ colleagues: await colleaguesOf(actor) }));
