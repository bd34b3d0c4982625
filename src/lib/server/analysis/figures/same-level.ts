import type { StartRecord } from '$lib/model/start';
import type { Circuit } from '../circuit';

/** Three stalls or more at one level, within this many points, show where the machine stops by itself [ours]. */
const LEAST = 3;
const SAME_LEVEL = 1.5;

/**
 * Takes back a limit that was only near: where three other runs or more stall at the very same capacity with no limit
 * near, a hot day that brings one close to this run does not hold it. Limits that the log names stay. Changes the
 * starts in place.
 */
export function markSameLevel(circuit: Circuit, starts: readonly StartRecord[]): void {
	if (circuit.input.texts.activeLimit !== undefined) return;
	const levels = starts.flatMap(({ stall }) => (stall?.verdict === 'stall' ? [stall.levelPct] : []));
	for (const { stall } of starts) {
		if (stall?.verdict !== 'limited' || stall.limiting === 'met setpoint') continue;
		const same = levels.filter((level) => Math.abs(level - stall.levelPct) <= SAME_LEVEL);
		if (same.length < LEAST) continue;
		stall.verdict = 'stall';
		stall.limiting = null;
	}
}
