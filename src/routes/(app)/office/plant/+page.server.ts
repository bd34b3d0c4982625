import { comingsOf } from '$lib/server/services/deliveries';
import { colleaguesOf } from '$lib/server/services/people';
import { unitsOf } from '$lib/server/services/units';
import { actorOf } from '$lib/server/web/endpoint';

export const load = async (event) => {
	const actor = actorOf(event);
	const comings = await comingsOf(actor);
	const units = (await unitsOf(actor)).map(({ id, siteId, tag, refrigerant, circuits, namePlate, deliveryHours }) => ({
		id,
		siteId,
		tag,
		refrigerant,
		circuits,
		...(namePlate ? { namePlate } : {}),
		deliveryHours: deliveryHours ?? null,
		lastAt: comings.get(id)?.lastAt ?? null,
		lateHours: comings.get(id)?.lateHours ?? null
	}));
	return { units, colleagues: await colleaguesOf(actor) };
};
