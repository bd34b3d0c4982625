import { addTripWord, tripWordsOf } from '$lib/server/services/trip-words';
import { endpoint } from '$lib/server/web/endpoint';
import { made } from '$lib/server/web/made';
import * as operations from '$lib/server/web/operations/plant';

export const GET = endpoint(operations.listTripWords, ({ actor, params }) => tripWordsOf(actor, params.unit ?? ''));

export const POST = endpoint(operations.addTripWord, async ({ actor, params, body }) => {
	const unitId = params.unit ?? '';
	return made(await addTripWord(actor, unitId, body), `/api/units/${unitId}/trip-words`);
});
