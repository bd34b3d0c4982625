import { importPlant } from '$lib/server/services/plant-import';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';
import { made } from '$lib/server/web/made';
import { sheetOf } from '$lib/server/web/sheet-body';

export const POST = endpoint(operations.importPlant, async ({ actor, event }) =>
	made(await importPlant(actor, await sheetOf(event.request)), '/api/units')
);
