import type { Series, SeriesMap } from '$lib/model/series';
import type { DerivedKey } from '$lib/model/signals';
import type { Refrigerant, UnitNature } from '$lib/model/unit';
import { glide, saturationSeries } from '../refrigerants/saturation';
import { duty } from '../water/properties';
import { localSpacing } from './spacing';
import { hasReadings } from './window';

/** The saturations the derived quantities rest on, °C, and what had to be done to get them. */
export type Saturations = {
	evap: Series | undefined;
	/** Dew side: margin, discharge superheat. */
	condDew: Series | undefined;
	/** Bubble side: subcooling. */
	condBubble: Series | undefined;
	/** As logged where it is logged: approach and lift. */
	cond: Series | undefined;
	/** A logged saturation of unknown side with a glide over 0.5 K: the margin cannot be told. */
	sideUnknown: boolean;
	notes: string[];
};

const GLIDE_THAT_MATTERS = 0.5;

/**
 * Evaporator and condensing saturation: as logged, else worked out from the logged pressure (dew for evaporating).
 * Where the glide exceeds 0.5 K the condensing sides come from the pressure, since a controller's side is unknown.
 */
export function saturationsOf(map: SeriesMap, refrigerant: Refrigerant): Saturations {
	const notes: string[] = [];
	const fromPressure = (pressure: Series | undefined, side: 'dew' | 'bubble') =>
		hasReadings(pressure) ? saturationSeries(refrigerant, pressure, side) : undefined;
	let evap = hasReadings(map.evapSaturation) ? map.evapSaturation : undefined;
	if (evap === undefined && (evap = fromPressure(map.evapPressure, 'dew')) !== undefined) {
		notes.push(`Evaporator saturation is worked out from evaporator pressure (${refrigerant}, dew).`);
	}
	let cond = hasReadings(map.condSaturation) ? map.condSaturation : undefined;
	const logged = cond !== undefined;
	if (cond === undefined && (cond = fromPressure(map.condPressure, 'dew')) !== undefined) {
		notes.push(`Condensing saturation is worked out from condenser pressure (${refrigerant}, dew).`);
	}
	const wide = Math.abs(glide(refrigerant, 900) ?? 0) > GLIDE_THAT_MATTERS;
	const dew = wide || !logged ? fromPressure(map.condPressure, 'dew') : undefined;
	const bubble = wide || !logged ? fromPressure(map.condPressure, 'bubble') : undefined;
	const sideUnknown = wide && dew === undefined && cond !== undefined;
	return { evap, cond, condDew: dew ?? cond, condBubble: bubble ?? cond, sideUnknown, notes };
}

/**
 * A quantity of two signals, reading by reading: `join(a, b)`. Row-aligned series are joined row by row; otherwise the
 * denser one gives the times and the other's last reading counts while it is no older than its own local spacing.
 * Where either part has no fresh reading the value is NaN: not zero, not carried. O(n + m).
 */
export function join2(a: Series, b: Series, join: (a: number, b: number) => number): Series {
	const v = new Float64Array(Math.max(a.t.length, b.t.length));
	if (a.t === b.t) {
		for (let i = 0; i < v.length; i++) v[i] = join(a.v[i] ?? NaN, b.v[i] ?? NaN);
		return { t: a.t, v, logging: 'interval' };
	}
	const aLeads = a.t.length >= b.t.length;
	const [lead, other] = aLeads ? [a, b] : [b, a];
	const fresh = freshOnto(lead.t, other);
	for (let i = 0; i < v.length; i++) {
		const mine = lead.v[i] ?? NaN;
		const its = fresh[i] ?? NaN;
		v[i] = aLeads ? join(mine, its) : join(its, mine);
	}
	return { t: lead.t, v, logging: 'interval' };
}

/** The other signal's fresh readings at given rising instants, NaN where none is fresh. */
function freshOnto(instants: Float64Array, other: Series): Float64Array {
	const out = new Float64Array(instants.length).fill(NaN);
	let j = -1;
	let last = -1;
	let spacing = 0;
	let spacingAt = -Infinity;
	for (let i = 0; i < instants.length; i++) {
		const at = instants[i] ?? NaN;
		while (j + 1 < other.t.length && (other.t[j + 1] ?? Infinity) <= at) {
			j++;
			if (!Number.isNaN(other.v[j] ?? NaN)) last = j;
		}
		if (last < 0) continue;
		const from = other.t[last] ?? NaN;
		// The spacing is looked up anew when the reading has moved on by more than a few spacings.
		if (!(from - spacingAt <= 4 * spacing)) {
			spacing = (localSpacing(other, from) ?? 0) * 1000;
			spacingAt = from;
		}
		if (at - from <= spacing) out[i] = other.v[last] ?? NaN;
	}
	return out;
}

const minus = (a: number, b: number) => a - b;

/**
 * A derived quantity of a circuit, sample by sample (K, kPa or kW):
 * superheat = suction − evaporator saturation (dew); dischargeSuperheat = discharge − condensing (dew);
 * subcooling = condensing (bubble) − liquid; evapApproach = leaving water − evaporator saturation;
 * condApproach = condensing − leaving condenser water; margin = oil − condensing (dew); lift = condensing − evaporator;
 * systemDelta = condenser − evaporator pressure; oilNet = oil − evaporator pressure; evapDelta = entering − leaving
 * water; duty = flow × density × cp × evapDelta.
 * @returns undefined when a part has no readings, or its side cannot be told
 */
export function deriveSeries(
	key: DerivedKey,
	map: SeriesMap,
	saturations: Saturations,
	nature: UnitNature
): Series | undefined {
	const difference = (a: Series | undefined, b: Series | undefined) =>
		hasReadings(a) && hasReadings(b) ? join2(a, b, minus) : undefined;
	const { evap, cond, condDew, condBubble } = saturations;
	switch (key) {
		case 'superheat':
			return difference(map.suctionTemp, evap);
		case 'dischargeSuperheat':
			return difference(map.dischargeTemp, condDew);
		case 'subcooling':
			return difference(condBubble, map.liquidTemp);
		case 'evapApproach':
			return difference(map.evapWaterOut, evap);
		case 'condApproach':
			return difference(cond, map.condWaterOut);
		case 'margin':
			return saturations.sideUnknown ? undefined : difference(map.oilTemp, condDew);
		case 'lift':
			return difference(cond, evap);
		case 'systemDelta':
			return difference(map.condPressure, map.evapPressure);
		case 'oilNet':
			return difference(map.oilPressure, map.evapPressure);
		case 'evapDelta':
			return difference(map.evapWaterIn, map.evapWaterOut);
		case 'duty':
			return dutySeries(map, nature);
	}
}

function dutySeries(map: SeriesMap, nature: UnitNature): Series | undefined {
	const { evapFlow, evapWaterIn, evapWaterOut } = map;
	if (!hasReadings(evapFlow) || !hasReadings(evapWaterIn) || !hasReadings(evapWaterOut)) return undefined;
	const fluid = nature.evapFluid ?? undefined;
	// Entering and leaving are joined first; the leaving temperature is then entering minus the difference.
	const delta = join2(evapWaterIn, evapWaterOut, minus);
	const leaving = join2(delta, evapWaterOut, (d, out) => (Number.isNaN(d) ? NaN : out));
	const ratio = join2(delta, leaving, (d, out) => duty(1, out + d, out, fluid));
	return join2(ratio, evapFlow, (each, flow) => each * flow);
}
