import { firstMoverOfStart } from '$lib/server/services/first-movers';
import { endpoint } from '$lib/server/web/endpoint';
import { getFirstMover } from '$lib/server/web/operations/starts';

export const GET = endpoint(getFirstMover, ({ actor, params, units }) =>
	firstMoverOfStart(actor, params.start ?? '', units)
);
