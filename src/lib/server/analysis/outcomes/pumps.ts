import type { Circuit } from '../circuit';
import { lastReading } from '../series/window';
import type { Run } from '../starts/runs';

const SIGNS = ['evapPumpRun', 'evapFlowProof', 'condPumpRun', 'condFlowProof'] as const;

/** Did every pump and flow proof that was on with the compressor go off in the row of its stop? null when none is logged. */
function pumpsFell(circuit: Circuit, run: Run): boolean | null {
	if (run.end !== 'off' || run.endedAt === null) return null;
	let watched = 0;
	for (const id of SIGNS) {
		const series = circuit.map[id];
		if (series === undefined) continue;
		const before = lastReading(series, run.lastOn, 400);
		const after = lastReading(series, run.endedAt, 400);
		if (before === null || after === null || after.at <= run.lastOn || before.value < 0.5) continue;
		if (after.value >= 0.5) return false;
		watched++;
	}
	return watched > 0 ? true : null;
}

/** Pumps that stop with the compressor at more than this share of stops do so by habit. */
const HABIT = 0.25;
const LEAST_STOPS = 4;

/**
 * For every run: did the pumps stop in the very row of its stop although they usually run on? true then, false when they
 * ran on, null where it is their habit or nothing is logged. A supply that fails takes them all at once.
 */
export function pumpsStoppedToo(circuit: Circuit): (boolean | null)[] {
	const fell = circuit.runs.map((run) => pumpsFell(circuit, run));
	const told = fell.filter((f) => f !== null);
	const habit = told.length < LEAST_STOPS || told.filter(Boolean).length > HABIT * told.length;
	return fell.map((f) => (f === true && habit ? null : f));
}
