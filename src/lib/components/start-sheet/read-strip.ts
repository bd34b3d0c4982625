import { fromStored, type UnitSystem } from '$lib/model/quantities';
import type { TraceKey } from '$lib/model/signals';
import { decimalsOf, formatNumber } from '$lib/utils/format';
import { localSpacing, nearestSample } from '$lib/utils/nearest-sample';
import { printedMeasure, type StartTraces } from './start-traces';
import type { StripSpec } from './strips';

/** What the cursor reads of one trace of one start. */
export type Reading = {
	/** ms UTC of the stored reading */
	at: number;
	/** stored units, as in the log */
	stored: number;
	/** in the person's units of measure */
	text: string;
};

export type ReadLine = {
	key: TraceKey;
	label: string;
	short: string;
	/** A companion of the strip's own traces. */
	faint: boolean;
	/** Has a line of its own on the strip. */
	drawn: boolean;
	reading: Reading | null;
	held: Reading | null;
	/** Why there is no reading. */
	why: string;
};

const SIGNED: ReadonlySet<string> = new Set(['lift', 'margin']);

/**
 * The stored reading of one trace nearest to an elapsed time: within one local spacing, held for change-of-value traces,
 * nothing in a gap.
 * @param seconds from the set's own start
 */
export function readTrace(
	set: StartTraces,
	key: TraceKey,
	seconds: number,
	system: UnitSystem,
	air: number
): Reading | null {
	const trace = set.traces.get(key);
	if (!trace) return null;
	const at = set.startMs + seconds * 1000;
	const sample = nearestSample(trace, at, trace.hold, localSpacing(trace.t, at));
	if (!sample) return null;
	const measure = printedMeasure(trace, system);
	const value = fromStored(sample.value, measure, air);
	const text = formatNumber(value, decimalsOf(measure), { sign: SIGNED.has(key) });
	return { at: sample.at, stored: sample.value, text };
}

/** Every read-out of a strip at the cursor: its own traces, then the derived values without a line. */
export function readStrip(
	spec: StripSpec,
	main: StartTraces,
	held: StartTraces | null,
	seconds: number,
	system: UnitSystem,
	air: number
): ReadLine[] {
	const lines: ReadLine[] = [];
	const drawnKeys = new Set(spec.traces.map(({ key }) => key));
	for (const { key, label, short, faint } of [...spec.traces, ...spec.readOnly]) {
		// A companion line from another strip is read out there.
		if (faint && spec.key === 'condenser') continue;
		if (!main.traces.has(key) && !held?.traces.has(key)) continue;
		const reading = readTrace(main, key, seconds, system, air);
		lines.push({
			key,
			label,
			short: short ?? label,
			faint: faint ?? false,
			drawn: drawnKeys.has(key),
			reading,
			held: held ? readTrace(held, key, seconds, system, air) : null,
			why: main.traces.has(key) ? 'no reading here' : 'not in this log'
		});
	}
	return lines;
}
