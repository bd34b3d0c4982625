import { daysOf } from '$lib/server/services/days';
import { endpoint } from '$lib/server/web/endpoint';
import { getDays } from '$lib/server/web/operations/plant';

export const GET = endpoint(getDays, ({ actor, params, query, units }) =>
	daysOf(actor, params.unit ?? '', query, units)
);
