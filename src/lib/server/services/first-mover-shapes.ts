import type { KeptFirstMover } from '$lib/model/first-mover';
import type { Quantity, UnitSystem } from '$lib/model/quantities';
import { DERIVED, isSignalKey, signalOf, SIGNALS, type DerivedKey } from '$lib/model/signals';
import type { FirstMover } from '$lib/model/wire/start-sheet';
import type { FirstMoverResult } from '$lib/server/analysis/first-mover/first-mover';
import { inUnits, unitsObject } from './start-shapes';

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
