import { airPressure } from '$lib/model/quantities';
import type { Site, Unit } from '$lib/model/wire/site-unit';
import type { Units } from '$lib/model/wire/common';
import type { Start } from '$lib/model/wire/start';
import type { LimitsInForce } from '$lib/components/start-sheet/strip-domain';
import { limitsInForce } from '$lib/components/start-sheet/limits-in-force';

/** What the small figures of a suspects sheet need to know of the unit and its starts. */
export type SuspectsContext = {
	unitId: string;
	zone: string;
	/** kPa absolute */
	air: number;
	starts: ReadonlyMap<string, Start>;
	/** Units of measure of the starts' figures. */
	units: Units;
	/** Limits in force at the latest start. */
	limits: LimitsInForce;
	/** The latest held start before an instant, else the first held one. */
	heldBefore: (at: string | null) => Start | null;
	/** °C; the cut-out in force at an instant */
	cutoutAt: (at: string | null) => number | null;
};

/** Gathers the context of a unit's suspects from its starts, oldest first. */
export function suspectsContext(unit: Unit, site: Site, starts: readonly Start[]): SuspectsContext {
	const held = starts.filter(({ outcome }) => outcome === 'held');
	return {
		unitId: unit.id,
		zone: site.timeZone,
		air: airPressure(site.altitude ?? 0),
		units: starts[0]?.units ?? {},
		limits: limitsInForce(unit.limits, Date.parse(starts.at(-1)?.startedAt ?? '') || Infinity),
		starts: new Map(starts.map((start) => [start.id, start])),
		heldBefore: (at) => (at === null ? null : (held.findLast(({ startedAt }) => startedAt < at) ?? held[0] ?? null)),
		cutoutAt: (at) =>
			limitsInForce(unit.limits, at === null ? Infinity : Date.parse(at)).evapSaturationCutout?.value ?? null
	};
}
