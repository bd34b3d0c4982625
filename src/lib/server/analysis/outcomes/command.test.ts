import { describe, expect, it } from 'vitest';
import { prepareCircuit } from '../circuit';
import { readRunning } from '../starts/running';
import { inventedInput, inventedLog, MIDNIGHT } from '../testing/synthetic-log';
import { commandTells } from './command';
import { commandFall } from './evidence';

// Invented: four runs of an hour; the second and fourth trip.
const runs = [0, 1, 2, 3].map((i) => ({ start: 3600 + i * 7200, stop: 7200 + i * 7200 }));
const tripped = [false, true, false, true];
const circuitWith = (command: (t: number) => number) => {
	const input = inventedInput(inventedLog(runs, 5, 0, 32_400, { startCommand: command }));
	const running = readRunning(input.series, {});
	if (running === null) throw new Error('no running');
	return prepareCircuit(input, running, () => false);
};
const inRun = (t: number) => runs.findIndex((r) => t >= r.start && t < r.stop);

describe('commandTells', () => {
	it('is told by a run command, which drops on a normal stop only', () => {
		expect(
			commandTells(
				circuitWith((t) => (inRun(t) >= 0 || tripped[Math.floor((t - 3600) / 7200)] === true ? 1 : 0)),
				tripped
			)
		).toBe(true);
	});

	it('is not told by a plant enable, nor by a command that repeats the status', () => {
		expect(
			commandTells(
				circuitWith(() => 1),
				tripped
			)
		).toBe(false);
		expect(
			commandTells(
				circuitWith((t) => (inRun(t) >= 0 ? 1 : 0)),
				tripped
			)
		).toBe(false);
	});

	it('dates the fall, and forgets one that came back', () => {
		const circuit = circuitWith((t) => (t >= 3600 && t < 7150 ? 1 : 0));
		const [first, second] = circuit.runs;
		if (first === undefined || second === undefined) throw new Error('runs expected');
		const command = circuit.input.series.startCommand;
		expect(commandFall(command, first, first.endedAt ?? 0)).toBe(MIDNIGHT + 7_150_000);
		expect(commandFall(command, second, second.endedAt ?? 0)).toBeNull();
		expect(commandFall(undefined, first, 0)).toBeNull();
	});
});
