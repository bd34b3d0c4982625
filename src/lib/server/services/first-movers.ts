import type { KeptFirstMover } from '$lib/model/first-mover';
import type { Actor } from '$lib/model/people';
import type { Quantity, UnitSystem } from '$lib/model/quantities';
import { DERIVED, isSignalKey, signalOf, SIGNALS, type DerivedKey } from '$lib/model/signals';
import type { FirstMover } from '$lib/model/wire/start-sheet';
import type { FirstMoverResult } from '$lib/server/analysis/first-mover/first-mover';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { inUnits, unitsObject } from './start-shapes';
import { visibleStart } from './starts';

/** A first mover as it is kept with its start: what cannot be had is null. */
export function keepFirstMover(found: FirstMoverResult): KeptFirstMover {
	const blank = (values: number[]) => values.map((value) => (Number.isFinite(value) ? value : null));
	const bands = found.bands.flatMap(({ signal, t, low, high }) => {
		const key = signal in DERIVED ? (signal as DerivedKey) : signalOf(signal as Parameters<typeof signalOf>[0]);
		return key === signal ? [{ signal: key, t, low: blank(low), high: blank(high) }] : [];
	});
	return { ...found, bands };
}

const quantityOf = (signal: string): Quantity =>
	isSignalKey(signal) ? SIGNALS[signal].quantity : DERIVED[signal as DerivedKey].quantity;

/** A kept first mover in the units of an answer. */
export function firstMoverShape(kept: KeptFirstMover, system: UnitSystem): FirstMover {
	const bands = kept.bands.map(({ signal, t, low, high }) => {
		const quantity = quantityOf(signal);
		const say = (values: (number | null)[]) =>
			values.map((value) => (value === null ? null : inUnits(value, quantity, system)));
		return { signal, quantity, t, low: say(low), high: say(high) };
	});
	return { ...kept, bands, units: unitsObject(system) };
}

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
