import { startSheet } from '$lib/server/services/start-sheet';
import { correctStart } from '$lib/server/services/starts';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/starts';

export const GET = endpoint(operations.getStart, async ({ actor, params, units }) => {
	const sheet = await startSheet(actor, params.start ?? '', units);
	// The start's own fields stand at the top too, as the contract's `Start`.
	return { ...sheet.start, ...sheet };
});
export const PATCH = endpoint(operations.correctStart, ({ actor, params, body, units }) =>
	correctStart(actor, params.start ?? '', body, units)
);
