import type { StartCorrection, Trip } from '$lib/model/start';
import type { Verdict } from '../outcomes/judge';
import type { Run } from './runs';

/** A correction finds its start within this many ms. */
const REACH = 120_000;

/** The correction made to the start at an instant: same circuit, nearest, within 2 min; null when none. */
export function correctionOf(
	corrections: readonly StartCorrection[],
	circuit: string,
	startedAt: number
): StartCorrection | null {
	let best: StartCorrection | null = null;
	for (const each of corrections) {
		const away = Math.abs(each.startedAt - startedAt);
		if (each.circuit !== circuit || away > REACH) continue;
		if (best === null || away < Math.abs(best.startedAt - startedAt)) best = each;
	}
	return best;
}

/** A run with the start instant a person gave. */
export function correctedRun(run: Run, correction: StartCorrection | null): Run {
	const at = correction?.newStartedAt;
	return at === undefined ? run : { ...run, startedAt: at, lastOn: Math.max(run.lastOn, at) };
}

/** The outcome and trip a person gave, with the reason; the log's own verdict otherwise. */
export function correctedVerdict(verdict: Verdict, correction: StartCorrection | null, stop: number): Verdict {
	if (correction === null || (correction.outcome === undefined && correction.tripKind === undefined)) return verdict;
	const outcome = correction.outcome ?? (correction.tripKind === undefined ? verdict.outcome : 'tripped');
	const reason = `Corrected by a person: ${correction.reason}`;
	if (outcome !== 'tripped') return { outcome, trip: null, reason };
	const kind = correction.tripKind ?? verdict.trip?.kind ?? 'unknown';
	const found: Trip = verdict.trip ?? { at: stop, kind, basis: 'inferred', text: null, sureness: 1, reason };
	return { outcome, trip: { ...found, kind, reason }, reason };
}
