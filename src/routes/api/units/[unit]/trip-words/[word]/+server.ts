import { removeTripWord } from '$lib/server/services/trip-words';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/plant';

export const DELETE = endpoint(operations.removeTripWord, ({ actor, params }) =>
	removeTripWord(actor, params.unit ?? '', params.word ?? '')
);
