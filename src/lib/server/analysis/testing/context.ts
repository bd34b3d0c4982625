import type { CircuitInput } from '$lib/model/circuit-input';
import type { SeriesId } from '$lib/model/signals';
import { prepareCircuit, type Circuit } from '../circuit';
import type { FigureContext } from '../figures/sheet';
import { readRunning } from '../starts/running';
import { inventedInput, inventedLog, type InventedRun, type Shape } from './synthetic-log';

/** A circuit around invented series. */
export function inventedCircuit(
	runs: readonly InventedRun[],
	spacing: number,
	to: number,
	shapes: Partial<Record<SeriesId, Shape>>,
	more: Partial<CircuitInput> = {}
): Circuit {
	const input = inventedInput(inventedLog(runs, spacing, 0, to, shapes), more);
	const running = readRunning(input.series, input.nature);
	if (running === null) throw new Error('an invented log runs');
	return prepareCircuit(input, running, () => false);
}

/** The figure context of an invented log's only run, from 3,600 s for `seconds`. */
export function inventedContext(
	seconds: number,
	spacing: number,
	shapes: Partial<Record<SeriesId, Shape>>,
	more: Partial<CircuitInput> = {}
): FigureContext {
	const stop = 3600 + seconds;
	const circuit = inventedCircuit([{ start: 3600, stop }], spacing, stop + 3600, shapes, more);
	const run = circuit.runs[0];
	if (run === undefined || run.endedAt === null) throw new Error('an invented run ends');
	return {
		circuit,
		run,
		startedAt: run.startedAt,
		observedAt: run.startedAt,
		correction: null,
		stop: run.endedAt,
		stopped: true,
		seconds: (run.endedAt - run.startedAt) / 1000,
		window: 1200,
		spacing,
		restSeconds: 3600
	};
}
