import type { StartRecord } from '$lib/model/start';
import { SIGNALS, type SignalKey } from '$lib/model/signals';
import { finite } from '../statistics/finite';
import type { Excluded } from '../comparison/first-tries';
import { type Words } from '../wording/quantity-words';

/** A start counts as exposed within this much of the failing starts' range, K. */
const REACH = 2;

type Condition = { signal: SignalKey; label: string; of: (start: StartRecord) => number | null };

/** What the failing starts had in common; `setpointOf` reads the water setpoint at a start where it is logged. */
export function conditionsOf(setpointOf: (start: StartRecord) => number | null): Condition[] {
	return [
		{
			signal: 'condWaterIn',
			label: 'condenser water',
			of: (start) => start.figures.condWaterInAtStart ?? start.figures.outdoorAtStart
		},
		{ signal: 'evapWaterOut', label: SIGNALS.evapWaterOut.label, of: (start) => start.figures.waterOutAtStart },
		{ signal: 'waterSetpoint', label: SIGNALS.waterSetpoint.label, of: setpointOf }
	];
}

export type Exposure = {
	/** Only first starts (after a long rest) count, as all failing ones were. */
	firstStartsOnly: boolean;
	ranges: { signal: SignalKey; label: string; low: number; high: number; of: Condition['of'] }[];
	/** Conditions that are not logged and therefore left out. */
	leftOut: string[];
};

/** The rest class and ranges of the failing starts. */
export function exposureOf(failing: readonly StartRecord[], conditions: readonly Condition[]): Exposure {
	const exposure: Exposure = {
		firstStartsOnly: failing.length > 0 && failing.every((start) => start.firstStart),
		ranges: [],
		leftOut: []
	};
	for (const condition of conditions) {
		const values = finite(failing.map((start) => condition.of(start) ?? NaN));
		if (values.length === 0) exposure.leftOut.push(condition.label);
		else
			exposure.ranges.push({
				...condition,
				low: Math.min(...values) - REACH,
				high: Math.max(...values) + REACH
			});
	}
	return exposure;
}

/** Why a counted first try was not exposed to what failed before; null when it was. */
export function notExposed(start: StartRecord, exposure: Exposure, words: Words): Excluded['reason'] | null {
	if (exposure.firstStartsOnly && !start.firstStart)
		return 'it followed a short rest; the failing ones followed long rests';
	for (const { label, low, high, of } of exposure.ranges) {
		const value = of(start);
		if (value !== null && (value < low || value > high))
			return `${label} ${words.temperature(value)} was outside the failing starts' range, ${words.temperature(low)} to ${words.temperature(high)}`;
	}
	return null;
}
