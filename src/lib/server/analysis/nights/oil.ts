import type { Interval } from '$lib/model/series';
import type { Circuit } from '../circuit';
import type { WatchedSignal } from '../first-mover/bands';
import { median, theilSen } from '../series/numbers';
import { readingsWithin } from '../series/window';
import { restMedian } from './rest-view';
import type { RestReading } from './types';

const HOUR = 3_600_000;
/** A rest must be this long before oil's decay says anything [ours]. */
const LEAST_REST = 4 * HOUR;
/** Above ambient by this much a plateau is held by a heater; under the other it has gone to ambient, K [ours]. */
const HELD = 8;
const GONE = 4;
/** A plateau moves by less than this, K/h [ours]. */
const PLATEAU = 0.7;

/**
 * Oil's decay over a rest of four hours or more: a plateau above ambient passes (the heater works), an asymptote at
 * ambient fails (heater suspect). Ambient is what else rests in the room: the least of suction, discharge and condensing
 * saturation, else outdoor. While it still falls, the asymptote is Aitken's through the last three hours.
 */
export function readOilDecay(circuit: Circuit, rest: Interval): RestReading {
	const reading = (result: RestReading['result'], value: number | null, why: string): RestReading => {
		return { key: 'oil-heater', result, value, quantity: 'temperatureDifference', why };
	};
	if (circuit.trace('oilTemp') === undefined) return reading('not-testable', null, 'Oil temperature is not logged.');
	if (rest.to - rest.from < LEAST_REST) return reading('not-testable', null, 'The rest was shorter than four hours.');
	const ambient = ambientOf(circuit, rest);
	if (ambient === null) return reading('not-testable', null, 'Nothing in the log shows the ambient temperature.');
	const hour = (back: number) =>
		restMedian(circuit, 'oilTemp', { from: rest.to - (back + 0.5) * HOUR, to: rest.to - (back - 0.5) * HOUR });
	const [before, middle, last] = [hour(2.5), hour(1.5), hour(0.5)];
	if (before === null || middle === null || last === null)
		return reading('not-testable', null, 'Oil was not read all night.');
	const above = last - ambient;
	if (above <= GONE) return reading('failed', above, 'Oil went down to ambient.');
	const slope = oilSlope(circuit, rest);
	if (slope !== null && Math.abs(slope) < PLATEAU && above >= HELD)
		return reading('passed', above, 'Oil stayed above ambient.');
	const bend = before + last - 2 * middle;
	const asymptote = Math.abs(bend) < 0.05 ? null : (before * last - middle * middle) / bend;
	if (asymptote === null || asymptote > last) return reading('not-testable', above, 'Oil was still falling.');
	const left = asymptote - ambient;
	if (left <= GONE) return reading('failed', left, 'Oil was falling toward ambient.');
	if (left >= HELD) return reading('passed', left, 'Oil was settling above ambient.');
	return reading('not-testable', left, 'Oil was still falling, to a little above ambient.');
}

function oilSlope(circuit: Circuit, rest: Interval): number | null {
	const oil = circuit.trace('oilTemp');
	if (oil === undefined) return null;
	const { t, v } = readingsWithin(oil, rest.to - 2 * HOUR, rest.to);
	return theilSen(
		t.map((at) => (at - rest.from) / HOUR),
		v
	);
}

function ambientOf(circuit: Circuit, rest: Interval): number | null {
	const end = { from: rest.to - HOUR, to: rest.to };
	const ids: WatchedSignal[] = ['suctionTemp', 'dischargeTemp', 'condSaturation'];
	const inRoom = ids.map((id) => restMedian(circuit, id, end)).filter((v) => v !== null);
	return inRoom.length > 0 ? Math.min(...inRoom) : restMedian(circuit, 'outdoorTemp', end);
}

/** Oil this far above saturation at the restart has boiled off what it took up; so near it, refrigerant is in it, K [ours]. */
const LIFT_GOOD = 8;
const LIFT_BAD = 3;

/** Oil lift at the restart, K: oil − evaporator saturation over the last ten minutes of a rest of four hours or more. */
export function readOilLift(circuit: Circuit, rest: Interval): RestReading {
	const end = { from: rest.to - 600_000, to: rest.to - 1 };
	const [oil, saturation] = [restMedian(circuit, 'oilTemp', end), restMedian(circuit, 'evapSaturation', end)];
	const base = { key: 'oil-lift' as const, quantity: 'temperatureDifference' as const };
	if (oil === null || saturation === null) {
		return { ...base, result: 'not-testable', value: null, why: 'Oil or evaporator saturation was not read.' };
	}
	const value = oil - saturation;
	if (rest.to - rest.from < LEAST_REST)
		return { ...base, result: 'shown', value, why: 'The rest was shorter than four hours.' };
	if (value >= LIFT_GOOD) return { ...base, result: 'passed', value, why: 'Oil rested well above saturation.' };
	if (value < LIFT_BAD)
		return { ...base, result: 'failed', value, why: 'Oil rested at saturation: refrigerant goes into it.' };
	return { ...base, result: 'shown', value, why: 'Oil rested a little above saturation.' };
}

/** A difference this small at the stop has nothing to equalise: kPa, or K of lift [ours]. */
const LEAST_DIFFERENCE = { systemDelta: 60, lift: 6 };

/**
 * Half-time of pressure equalising, s: from the stop until the pressure difference (lift where pressures are not logged)
 * has come down to half of what it was. Judged against the unit's own history by {@link judgeEqualising}.
 */
export function readEqualising(circuit: Circuit, rest: Interval): RestReading {
	const base = { key: 'equalising' as const, quantity: 'duration' as const };
	const not = (why: string): RestReading => ({ ...base, result: 'not-testable', value: null, why });
	const id = circuit.trace('systemDelta') !== undefined ? 'systemDelta' : 'lift';
	const series = circuit.trace(id);
	if (series === undefined) return not('Neither pressures nor saturations are logged.');
	const before = median(readingsWithin(series, rest.from - 120_000, rest.from - 1).v);
	if (before === null || before < LEAST_DIFFERENCE[id]) return not('There was too little difference at the stop.');
	const after = readingsWithin(series, rest.from, Math.min(rest.to, rest.from + 2 * HOUR));
	const i = after.v.findIndex((v) => v <= before / 2);
	const at = after.t[i];
	if (at === undefined) return not('The difference did not come down to half in the rest.');
	const previous = after.t[i - 1] ?? rest.from;
	const seconds = (at - rest.from) / 1000;
	if ((at - previous) / 1000 > seconds / 2) return not('Sampled too far apart to see it fall.');
	return {
		...base,
		result: 'shown',
		value: seconds,
		why: `Half of ${id === 'lift' ? 'the lift' : 'the pressure difference'} was gone.`
	};
}

/** At least this many earlier half-times make a history; under half of their median is too fast [ours]. */
const HISTORY = 5;

/** Marks half-times against the median of those before: under half of it fails (a check or feed valve leaks). In place. */
export function judgeEqualising(readings: RestReading[]): void {
	const earlier: number[] = [];
	for (const reading of readings) {
		if (reading.value === null) continue;
		const usual = earlier.length >= HISTORY ? median(earlier) : null;
		earlier.push(reading.value);
		if (usual === null) continue;
		reading.result = reading.value < usual / 2 ? 'failed' : 'passed';
		reading.why = `The unit's own usual half-time is ${Math.round(usual)} s.`;
	}
}
