import { colleaguesOf } from '$lib/server/services/people';
import { unitsOf } from '$lib/server/services/units';
import { actorOf } from '$lib/server/web/endpoint';

export const load = async (event) => {
	const actor = actorOf(event);
	const units = (await unitsOf(actor)).map(({ id, siteId, tag, refrigerant, circuits, deliveryHours }) => ({
		id,
		siteId,
		tag,
		refrigerant,
		circuits,
		deliveryHours: deliveryHours ?? null
	}));
	return { units, colleagues: await colleaguesOf(actor) };
};
