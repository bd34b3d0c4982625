import type { CircuitInput } from '$lib/model/circuit-input';
import type { StartRecord } from '$lib/model/start';
import type { SuspectsResult } from '$lib/model/suspect';
import type { Nights } from '$lib/model/wire/nights';

/** What to log until tomorrow so that the two leading suspects can be told apart. */
export function tonightsLog(
	_input: CircuitInput | null,
	_starts: readonly StartRecord[],
	_suspects: SuspectsResult | null
): Nights['tonight'] {
	return null;
}
