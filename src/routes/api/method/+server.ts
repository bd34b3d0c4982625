import { describeMethod } from '$lib/server/services/method';
import { endpoint } from '$lib/server/web/endpoint';
import { getMethod } from '$lib/server/web/operations/method';

export const GET = endpoint(getMethod, async () => describeMethod());
