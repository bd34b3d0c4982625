import { calendarOf } from '$lib/server/services/calendar';
import { siteOf } from '$lib/server/services/sites';
import { visitOf } from '$lib/server/services/visits';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/circle';

export const GET = endpoint(operations.visitCalendar, async ({ actor, params, event }) => {
	const visit = await visitOf(actor, params.visit ?? '');
	const { address } = await siteOf(actor, visit.siteId);
	const link = `${event.url.origin}/visits/${visit.id}`;
	return new Response(calendarOf(visit, address, link), {
		headers: {
			'content-type': 'text/calendar; charset=utf-8',
			'content-disposition': `attachment; filename="visit-${visit.date}.ics"`
		}
	});
});
