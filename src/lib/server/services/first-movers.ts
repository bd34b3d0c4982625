import type { Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import type { FirstMover } from '$lib/model/wire/start-sheet';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { firstMoverShape } from './first-mover-shapes';
import { unitsObject } from './start-shapes';
import { visibleStart } from './starts';

/** Which signal left the held starts' band first, as the last analysis found it. */
export async function firstMoverOfStart(actor: Actor, startId: string, system: UnitSystem): Promise<FirstMover> {
	const { row } = await withOrganisation(actor.organisationId, (tx) => visibleStart(tx, actor, startId));
	const kept = row.extras.firstMover;
	if (kept) return firstMoverShape(kept, system);
	const why = 'The order is read for starts that tripped, beside five matched held starts at least.';
	return {
		sentence: why,
		cannotTell: why,
		heldStarts: 0,
		fromSeconds: 0,
		tripAtSeconds: null,
		departures: [],
		units: unitsObject(system)
	};
}
