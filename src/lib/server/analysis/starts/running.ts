import type { Series, SeriesMap } from '$lib/model/series';
import type { StartRecord } from '$lib/model/start';
import type { UnitNature } from '$lib/model/unit';
import { sampledQuantile } from '../series/numbers';
import { valueInForce } from '../series/hold';
import { localSpacing } from '../series/spacing';
import { hasReadings } from '../series/window';

export type RunningSource = Exclude<StartRecord['runningFrom'], 'record'>;

/** On and off as read: blanks left out, so neighbours in these arrays are neighbouring readings. */
export type RunningReadings = {
	t: Float64Array;
	on: Uint8Array;
	/** 1 where a blank record of a change-of-value column lies before the reading: the log was interrupted. */
	interrupted: Uint8Array;
	logging: Series['logging'];
	source: RunningSource;
	notes: string[];
};

/**
 * The current that counts as rated: 100 where the column is in % of rated, the unit's field, else the 95th percentile
 * of the running amps. @returns null when nothing tells
 */
export function ratedCurrent(current: Series, nature: UnitNature, running: Series | undefined): number | null {
	if (current.measure === 'pctRated') return 100;
	if (nature.ratedAmps) return nature.ratedAmps;
	const sameRows = running !== undefined && running.t === current.t;
	const amps = current.v.filter((v, i) => (sameRows ? running.v[i] === 1 : v > 0));
	const high = sampledQuantile(amps, 0.95);
	return high !== null && high > 0 ? high : null;
}

/**
 * When the circuit ran: its own column, which current vetoes where two readings or more are under 10 % of rated; without
 * that column current (10 % of rated), power (10 % of its 95th percentile), speed (5 %), capacity (3 points above its
 * idle level), in this order, else the start command.
 * @returns null when no column can tell
 */
export function readRunning(map: SeriesMap, nature: UnitNature): RunningReadings | null {
	if (hasReadings(map.running)) return withVeto(map.running, map.motorCurrent, nature);
	if (hasReadings(map.motorCurrent)) {
		const rated = ratedCurrent(map.motorCurrent, nature, undefined);
		if (rated !== null) return above(map.motorCurrent, 0.1 * rated, 'motorCurrent');
	}
	for (const [source, share] of [
		['power', 0.1],
		['speed', 0.05]
	] as const) {
		const series = map[source];
		const high = hasReadings(series)
			? sampledQuantile(
					series.v.filter((v) => v > 0),
					0.95
				)
			: null;
		if (series !== undefined && high !== null && high > 0) return above(series, share * high, source);
	}
	if (hasReadings(map.capacity)) {
		const idle = sampledQuantile(map.capacity.v, 0.02) ?? 0;
		if (idle < 20) return above(map.capacity, Math.max(idle, 0) + 3, 'capacity');
	}
	return hasReadings(map.startCommand) ? above(map.startCommand, 0.5, 'startCommand') : null;
}

const WORDS: Record<RunningSource, string> = {
	running: 'its own column',
	motorCurrent: 'motor current',
	power: 'power',
	speed: 'speed',
	capacity: 'capacity',
	startCommand: 'the start command, which may stand while the compressor is off'
};

function above(series: Series, threshold: number, source: RunningSource): RunningReadings {
	const notes = source === 'running' ? [] : [`No running column: running is taken from ${WORDS[source]}.`];
	return { ...compact(series, (v) => v >= threshold), source, notes };
}

function compact(series: Series, isOn: (v: number, i: number) => boolean) {
	const t = new Float64Array(series.t.length);
	const on = new Uint8Array(series.t.length);
	const interrupted = new Uint8Array(series.t.length);
	let count = 0;
	let blank = false;
	for (let i = 0; i < series.t.length; i++) {
		const v = series.v[i] ?? NaN;
		if (Number.isNaN(v)) {
			blank = true;
			continue;
		}
		t[count] = series.t[i] ?? NaN;
		on[count] = isOn(v, i) ? 1 : 0;
		interrupted[count++] = blank && series.logging === 'change' ? 1 : 0;
		blank = false;
	}
	return {
		t: t.subarray(0, count),
		on: on.subarray(0, count),
		interrupted: interrupted.subarray(0, count),
		logging: series.logging
	};
}

function withVeto(running: Series, current: Series | undefined, nature: UnitNature): RunningReadings {
	const plain = above(running, 0.5, 'running');
	if (!hasReadings(current) || running.logging === 'change') return plain;
	const rated = ratedCurrent(current, nature, running);
	if (rated === null) return plain;
	const low = lowCurrent(plain, current, 0.1 * rated);
	let onCount = 0;
	let lowCount = 0;
	for (let i = 0; i < low.length; i++) {
		onCount += plain.on[i] ?? 0;
		lowCount += low[i] ?? 0;
	}
	// A dead or mis-scaled current column would veto most of the running there is.
	if (lowCount > 0.5 * onCount) {
		plain.notes.push('Motor current stays low while the status says running: the status is believed.');
		return plain;
	}
	const on = Uint8Array.from(plain.on);
	for (let i = 0; i < low.length;) {
		let end = i;
		while (end < low.length && low[end] === 1) end++;
		if (end - i >= 2) on.fill(0, i, end);
		i = Math.max(end, i + 1);
	}
	return { ...plain, on };
}

/** 1 where the status is on and a fresh current reading is under the threshold. */
function lowCurrent(running: RunningReadings, current: Series, threshold: number): Uint8Array {
	const low = new Uint8Array(running.t.length);
	const within = localSpacing(current, current.t[Math.floor(current.t.length / 2)] ?? 0) ?? 0;
	for (let i = 0; i < low.length; i++) {
		if (running.on[i] !== 1) continue;
		const amps = valueInForce('motorCurrent', current, running.t[i] ?? NaN, within * 0.5);
		if (amps < threshold) low[i] = 1;
	}
	return low;
}
