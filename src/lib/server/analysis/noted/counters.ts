import type { CounterStretch } from '$lib/model/noted';

/** What the counters of one circuit showed; `at` ms UTC, `runHours` h. */
export type CounterReading = {
	circuit: string;
	at: number;
	starts: number | null;
	runHours: number | null;
	basis: CounterStretch['basis'];
};

const moved = (before: number | null, after: number | null): number | null =>
	before === null || after === null ? null : after - before;

/**
 * At least how many of `starts` ended before `window` seconds: starts − ⌊running time / window⌋ − 1, because each run
 * that lasted the window takes that much of the running time, and the last may still go on. Worked out here, no source.
 */
function shortRuns(starts: number | null, runSeconds: number | null, window: number): number | null {
	if (starts === null || runSeconds === null || !(window > 0)) return null;
	return Math.max(0, starts - Math.floor(runSeconds / window) - 1);
}

/**
 * Starts and running time between consecutive readings of each circuit's counters, oldest first. A counter that went
 * back was reset or replaced: nothing is told of that stretch. `window`: the start-up window, s.
 */
export function counterStretches(readings: readonly CounterReading[], window: number): CounterStretch[] {
	const sorted = [...readings].sort((a, b) => a.at - b.at);
	const last = new Map<string, CounterReading>();
	const stretches: CounterStretch[] = [];
	for (const reading of sorted) {
		const before = last.get(reading.circuit);
		last.set(reading.circuit, reading);
		if (before === undefined || before.at === reading.at) continue;
		const starts = moved(before.starts, reading.starts);
		const hours = moved(before.runHours, reading.runHours);
		const wentBack = (starts ?? 0) < 0 || (hours ?? 0) < 0;
		const told = (value: number | null): number | null => (wentBack || value === null ? null : value);
		const runSeconds = hours === null ? null : told(hours * 3600);
		stretches.push({
			circuit: reading.circuit,
			from: before.at,
			to: reading.at,
			starts: told(starts),
			runSeconds,
			meanRunSeconds: starts !== null && starts > 0 && runSeconds !== null ? runSeconds / starts : null,
			shortAtLeast: shortRuns(told(starts), runSeconds, window),
			wentBack,
			basis: reading.basis === 'logged' && before.basis === 'logged' ? 'logged' : 'typed'
		});
	}
	return stretches;
}
