import type { CircuitInput } from '$lib/model/circuit-input';
import { type SeriesId, type SignalKey, signalOf } from '$lib/model/signals';
import type { StartRecord } from '$lib/model/start';
import type { SuspectsResult } from '$lib/model/suspect';
import type { Nights } from '$lib/model/wire/nights';
import { tonightsLog as adviseLog } from '$lib/server/analysis/logging-advice';

/** What to log until tomorrow so that the two leading suspects can be told apart. */
export function tonightsLog(
	input: CircuitInput | null,
	starts: readonly StartRecord[],
	suspects: SuspectsResult | null
): Nights['tonight'] {
	if (!input || !suspects) return null;
	const logged = new Set<SignalKey>((Object.keys(input.series) as SeriesId[]).map(signalOf));
	return adviseLog({ suspects, nature: input.nature, starts, logged });
}
