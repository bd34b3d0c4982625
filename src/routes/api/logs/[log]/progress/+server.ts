import { logShape } from '$lib/server/services/log-shapes';
import { logRowOf } from '$lib/server/services/logs';
import { endpoint } from '$lib/server/web/endpoint';
import { eventStream } from '$lib/server/web/event-stream';
import { watchLog } from '$lib/server/web/operations/logs';

const ENDS = new Set(['ready', 'needs-mapping', 'refused']);
const EVERY_MS = 300;

export const GET = endpoint(watchLog, async ({ actor, params, event }) => {
	const id = params.log ?? '';
	// A first look before the stream: a log that is not there is a 404, not a broken stream.
	await logRowOf(actor, id);
	return eventStream(event.request.signal, EVERY_MS, async () => {
		const log = logShape(await logRowOf(actor, id));
		return { data: log, done: ENDS.has(log.state) };
	});
});
