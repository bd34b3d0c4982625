import type { UnitSystem } from '$lib/model/quantities';
import { FIGURE_KEYS, type StartRecord } from '$lib/model/start';
import type { PreviousMethod } from '$lib/model/previous-method';
import type { PreviousMethodShown } from '$lib/model/wire/start-sheet';
import { FIGURE_WORDS, OUTCOME_WORDS, TRIP_KIND_WORDS } from '$lib/model/words';
import { figureInUnits } from './start-shapes';

const STALL_WORDS = { stall: 'a stall', limited: 'held by a limit', 'cannot-tell': 'flat, cause not told' };

/** A sentence where old and new differ, else nothing. */
function told(what: string, before: string, now: string): string[] {
	return before === now ? [] : [`${what} was ${before}, is ${now}.`];
}

/** What an earlier method version said of a start beside the present record, in one person's units. */
export function previousShape(before: PreviousMethod, now: StartRecord, system: UnitSystem): PreviousMethodShown {
	const kind = (value: PreviousMethod['tripKind']) => (value === null ? 'none' : TRIP_KIND_WORDS[value]);
	const stall = (value: PreviousMethod['stall']) => (value === null ? 'none' : STALL_WORDS[value]);
	return {
		methodVersion: before.methodVersion,
		told: [
			...told('Outcome', OUTCOME_WORDS[before.outcome], OUTCOME_WORDS[now.outcome]),
			...told('Trip kind', kind(before.tripKind), kind(now.trip?.kind ?? null)),
			...told('Stall', stall(before.stall), stall(now.stall?.verdict ?? null))
		],
		figures: FIGURE_KEYS.filter((key) => key in before.figures).map((key) => {
			const shown = (value: number | null | undefined) =>
				value === null || value === undefined ? null : figureInUnits(key, value, system);
			return { key, label: FIGURE_WORDS[key], before: shown(before.figures[key]), now: shown(now.figures[key]) };
		})
	};
}
