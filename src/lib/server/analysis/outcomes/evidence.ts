import type { Series } from '$lib/model/series';
import type { Circuit } from '../circuit';
import { valueInForce } from '../series/hold';
import { extreme, lastReading, readingsWithin } from '../series/window';
import type { Run } from '../starts/runs';

/** What the log shows of a stop, besides alarms. `null` = the log cannot say. */
export type StopEvidence = {
	/** The run command fell before or at the stop, ms. */
	commandFellAt: number | null;
	/** The capacity came down toward its minimum before the stop. */
	unloaded: boolean | null;
	/** The valve or the liquid-line solenoid closed while it still ran. */
	valveClosed: boolean;
	/** Leaving water had come down to the setpoint. */
	setpointMet: boolean | null;
	waterAbove: boolean | null;
	loaded: boolean | null;
	/** Everything else that ran on the site stopped at the same moment. */
	allStopped: boolean;
};

/**
 * Reads the minutes before a stop at `stop` (ms, first off sample). `commandTells` says that the start command drops on
 * normal stops and not because the compressor stopped (see command.ts). `spacing` in s.
 */
export function readStop(
	circuit: Circuit,
	run: Run,
	stop: number,
	spacing: number,
	commandTells: boolean
): StopEvidence {
	const unloading = readUnloading(circuit, run, stop, spacing);
	// A command that repeats the status falls in the stop's own row; one that falls before it stopped the machine.
	const fell = commandFall(circuit.input.series.startCommand, run, stop);
	const water = readWater(circuit, run.lastOn);
	// Long at its minimum with the water under its setpoint it is as unloaded as it gets, however long ago that was.
	const idle = water !== null && water <= -UNDER_SETPOINT && atLeast(circuit, run, spacing);
	return {
		commandFellAt: fell !== null && (commandTells || fell <= run.lastOn) ? fell : null,
		unloaded: idle || unloading.unloaded,
		valveClosed: valveClosed(circuit, run),
		setpointMet: water === null ? null : water <= 0.05,
		waterAbove: water === null ? null : water > 0.05,
		loaded: idle ? false : unloading.loaded,
		allStopped: othersStopped(circuit, run, stop)
	};
}

/**
 * When the start command fell in a run: the last fall at or before the stop and no more than 10 min before it, ms, or
 * null. A command that was off all through the run is no command.
 */
export function commandFall(command: Series | undefined, run: Run, stop: number): number | null {
	if (command === undefined) return null;
	const readings = readingsWithin(command, run.startedAt - 120_000, stop);
	let fell: number | null = null;
	for (let i = 1; i < readings.t.length; i++) {
		const now = (readings.v[i] ?? NaN) >= 0.5;
		const before = (readings.v[i - 1] ?? NaN) >= 0.5;
		if (before && !now) fell = readings.t[i] ?? null;
		if (now) fell = null;
	}
	return fell !== null && stop - fell <= 600_000 ? fell : null;
}

/** Water this far under its setpoint asks for nothing, K [ours]. */
const UNDER_SETPOINT = 0.5;

/** Does the capacity stand at the least it runs at in the last running readings? */
function atLeast(circuit: Circuit, run: Run, spacing: number): boolean {
	const capacity = circuit.trace('capacity');
	if (capacity === undefined || circuit.leastCapacity === null) return false;
	const last = lastReading(capacity, run.lastOn, Math.max(30, 2 * spacing));
	return last !== null && last.value <= circuit.leastCapacity + 3;
}

/** Falls of this many points or more toward the minimum are an unloading [ours]. */
const UNLOADING = 8;

function readUnloading(
	circuit: Circuit,
	run: Run,
	stop: number,
	spacing: number
): { unloaded: boolean | null; loaded: boolean | null } {
	const capacity = circuit.trace('capacity') ?? circuit.trace('speed');
	if (capacity === undefined) return { unloaded: null, loaded: loadedByCurrent(circuit, run) };
	const end = Math.min(run.lastOn, stop);
	// An unloading before a stop is brisk; what modulates over minutes follows the load.
	const reach = Math.max(120_000, 2.5 * spacing * 1000);
	const readings = readingsWithin(capacity, Math.max(run.startedAt, end - reach), end);
	const last = readings.v.at(-1);
	if (last === undefined) return { unloaded: null, loaded: loadedByCurrent(circuit, run) };
	const most = extreme(readings, -1) ?? { value: last, at: end };
	// A slide that starts high and comes down from its first seconds is on its way to the start position.
	const settling = most.at <= run.startedAt + 30_000;
	const least = circuit.trace('capacity') === undefined ? 0.35 * most.value : (circuit.leastCapacity ?? 0);
	const fell = most.value - last;
	const nearLeast = last <= Math.max(least + 10, 0.4 * most.value);
	const stopping = fell >= UNLOADING && (nearLeast || fell >= 0.4 * most.value);
	const unloaded = stopping && !settling && !stillDemanded(circuit, end, spacing, last);
	return { unloaded, loaded: !unloaded && last > 5 };
}

/** Is well more demanded than `capacity` % at an instant: then what comes down is not unloading for a stop. */
function stillDemanded(circuit: Circuit, at: number, spacing: number, capacity: number): boolean {
	const demand =
		circuit.map.demand === undefined ? null : lastReading(circuit.map.demand, at, Math.max(30, 2 * spacing));
	return demand !== null && demand.value >= capacity + 10;
}

function loadedByCurrent(circuit: Circuit, run: Run): boolean | null {
	const current = circuit.trace('motorCurrent');
	if (current === undefined || circuit.rated === null) return null;
	const last = lastReading(current, run.lastOn, 120);
	return last === null ? null : last.value >= 0.25 * circuit.rated;
}

function valveClosed(circuit: Circuit, run: Run): boolean {
	const solenoid = circuit.map.liquidLineSolenoid;
	if (solenoid !== undefined) {
		const open = readingsWithin(solenoid, Math.max(run.startedAt, run.lastOn - 300_000), run.lastOn);
		if (open.v.length >= 2 && open.v.at(-1) === 0 && open.v.some((v) => v === 1)) return true;
	}
	const valve = circuit.trace('valvePosition');
	if (valve === undefined) return false;
	const readings = readingsWithin(valve, Math.max(run.startedAt + 60_000, run.lastOn - 180_000), run.lastOn);
	const last = readings.v.at(-1);
	if (last === undefined) return false;
	const most = readings.v.reduce((a, b) => Math.max(a, b), 0);
	return most >= 10 && last <= 0.2 * most && last <= 5;
}

/** Leaving water minus setpoint at the last running reading, K; null when either is not fresh. */
function readWater(circuit: Circuit, lastOn: number): number | null {
	const { evapWaterOut, waterSetpoint } = circuit.map;
	if (evapWaterOut === undefined || waterSetpoint === undefined) return null;
	const water = lastReading(evapWaterOut, lastOn, 400);
	const setpoint = valueInForce('waterSetpoint', waterSetpoint, lastOn, 900);
	return water === null || Number.isNaN(setpoint) ? null : water.value - setpoint;
}

/**
 * Did all else on the site that ran stop with this run? At least one other unit must have run, and everything that ran
 * must have stopped within one spacing or 60 s of it, the stop's own minute included.
 */
function othersStopped(circuit: Circuit, run: Run, stop: number): boolean {
	let otherUnits = 0;
	for (const other of circuit.input.others) {
		const before = valueInForce('running', other.running, run.lastOn - 30_000, 600);
		if (!(before >= 0.5)) continue;
		const reach = Math.max(60_000, run.endUncertainty * 1000);
		const after = valueInForce('running', other.running, stop + reach, 600);
		if (!(after < 0.5)) return false;
		if (!other.sameUnit) otherUnits++;
	}
	return otherUnits > 0;
}
