import { describe, expect, it } from 'vitest';
import type { CircuitInput } from '$lib/model/circuit-input';
import type { SeriesId } from '$lib/model/signals';
import { prepareCircuit } from '../circuit';
import { readRunning } from '../starts/running';
import { inventedInput, inventedLog, MIDNIGHT, type Shape } from '../testing/synthetic-log';
import { readStop } from './evidence';
import { pumpsStoppedToo } from './pumps';

// Invented: one run from 3,600 to 7,200 s; `left` is the time to its stop.
const stopAt = 7200;
function stopEvidence(shapes: Partial<Record<SeriesId, Shape>>, spacing = 5, more: Partial<CircuitInput> = {}) {
	const input = inventedInput(inventedLog([{ start: 3600, stop: stopAt }], spacing, 0, 9000, shapes), more);
	const running = readRunning(input.series, {});
	if (running === null) throw new Error('no running');
	const circuit = prepareCircuit(input, running, () => false);
	const run = circuit.runs[0];
	if (run?.endedAt === null || run === undefined) throw new Error('a stop expected');
	return readStop(circuit, run, run.endedAt, spacing, true);
}
const ramp = (left: number, high: number, low: number, over: number) =>
	Math.min(high, low + ((high - low) * left) / over);

describe('readStop', () => {
	it('sees the slide unload toward its minimum, and no unloading in a slow following of the load', () => {
		expect(stopEvidence({ capacity: (t) => ramp(stopAt - t, 90, 25, 60) })).toMatchObject({
			unloaded: true,
			loaded: false
		});
		expect(stopEvidence({ capacity: (t) => ramp(stopAt - t, 90, 60, 1800) })).toMatchObject({
			unloaded: false,
			loaded: true
		});
		expect(stopEvidence({ capacity: (t) => ramp(stopAt - t, 90, 25, 120) }, 60).unloaded).toBe(true);
	});

	it('is not told by capacity that comes down while far more is demanded', () => {
		const capacity: Shape = (t) => ramp(stopAt - t, 90, 25, 60);
		expect(stopEvidence({ capacity, demand: () => 100 }).unloaded).toBe(false);
		expect(stopEvidence({ capacity, demand: capacity }).unloaded).toBe(true);
	});

	it('takes current where capacity is not logged, and says null where neither is', () => {
		expect(stopEvidence({ motorCurrent: (_, s) => (Number.isNaN(s) ? 0 : 80) }).loaded).toBe(true);
		expect(stopEvidence({})).toMatchObject({ unloaded: null, loaded: null, setpointMet: null, waterAbove: null });
	});

	it('reads the water at the last running row against the setpoint', () => {
		const waterSetpoint = () => 7;
		expect(stopEvidence({ evapWaterOut: (t) => (t < stopAt ? 6.9 : 9), waterSetpoint }, 60)).toMatchObject({
			setpointMet: true,
			waterAbove: false
		});
		expect(stopEvidence({ evapWaterOut: () => 9, waterSetpoint })).toMatchObject({
			setpointMet: false,
			waterAbove: true
		});
	});

	it('sees the valve close', () => {
		expect(stopEvidence({ valvePosition: (t) => ramp(stopAt - t - 5, 60, 0, 40) }).valveClosed).toBe(true);
		expect(stopEvidence({ valvePosition: (t) => (t < stopAt ? 60 : 0) }).valveClosed).toBe(false);
		expect(stopEvidence({ liquidLineSolenoid: (t) => (t < stopAt - 40 ? 1 : 0) }).valveClosed).toBe(true);
	});

	it('sees that all else on the site stopped with it', () => {
		const running = inventedLog([{ start: 1000, stop: stopAt }], 5, 0, 9000).running;
		const still = inventedLog([{ start: 1000, stop: 8800 }], 5, 0, 9000).running;
		if (running === undefined || still === undefined) throw new Error('no running');
		const others = [{ name: 'B', sameUnit: false, running }];
		expect(stopEvidence({}, 5, { others }).allStopped).toBe(true);
		expect(
			stopEvidence({}, 5, { others: [...others, { name: 'C', sameUnit: false, running: still }] }).allStopped
		).toBe(false);
		expect(stopEvidence({}, 5, { others: [{ name: '2', sameUnit: true, running }] }).allStopped).toBe(false);
	});
});

describe('pumpsStoppedToo', () => {
	it('stands out where the pumps usually run on', () => {
		const runs = [0, 1, 2, 3, 4].map((i) => ({ start: 3600 + i * 7200, stop: 7200 + i * 7200 }));
		const last = runs[4]?.stop ?? 0;
		const overrun = (t: number) => runs.some((r, i) => t >= r.start - 60 && t < r.stop + (i === 4 ? 0 : 180));
		const input = inventedInput(inventedLog(runs, 5, 0, last + 3600, { evapPumpRun: (t) => (overrun(t) ? 1 : 0) }));
		const running = readRunning(input.series, {});
		if (running === null) throw new Error('no running');
		const circuit = prepareCircuit(input, running, () => false);
		expect(pumpsStoppedToo(circuit)).toEqual([false, false, false, false, true]);
		expect(circuit.runs[0]?.startedAt).toBe(MIDNIGHT + 3_600_000);
	});
});
