import type { Stall, StartRecord } from '$lib/model/start';
import type { Circuit } from '../circuit';
import { median, quantile } from '../series/numbers';
import { readingsWithin } from '../series/window';

/** Three flat stretches at the same current but at different capacities show that current held them [ours]. */
const LEAST = 3;
const SAME_CURRENT = 0.04;
const OTHER_CAPACITY = 8;
/** A limit is also where the current tops out: no more than this share above it in the runs. */
const TOPS_OUT = 1.05;

/** Another limit than current holds it. */
const byAnother = (stall: Stall) => stall.verdict === 'limited' && stall.limiting !== 'motor current';

/**
 * Marks stalls as limited by motor current where the limit is not logged but shows: over three stretches or more the
 * current stood within 4 % of one value while capacity differed by 8 points or more, and the machine never runs above
 * that current once started. A sticking slide does the opposite: its capacity stands and the current moves with the
 * lift. Changes the starts in place.
 */
export function markPinnedCurrent(circuit: Circuit, starts: readonly StartRecord[]): void {
	const current = circuit.trace('motorCurrent');
	if (current === undefined) return;
	const stalls = starts.flatMap(({ stall }) => (stall === null || byAnother(stall) ? [] : [stall]));
	if (stalls.length < LEAST) return;
	const amps = stalls.map((stall) => median(readingsWithin(current, stall.from, stall.to).v) ?? NaN);
	const usual = median(amps) ?? NaN;
	const pinned = stalls.filter((_, i) => Math.abs((amps[i] ?? NaN) - usual) <= (SAME_CURRENT / 2) * usual);
	if (pinned.length < Math.max(LEAST, 0.6 * stalls.length)) return;
	const levels = pinned.map((stall) => stall.levelPct);
	if (Math.max(...levels) - Math.min(...levels) < OTHER_CAPACITY) return;
	const high = circuit.runs.map(
		(run) => quantile(readingsWithin(current, run.startedAt + 120_000, run.lastOn).v, 0.98) ?? 0
	);
	if (Math.max(...high) > TOPS_OUT * usual) return;
	for (const stall of pinned) {
		stall.verdict = 'limited';
		stall.limiting = 'motor current';
	}
}
