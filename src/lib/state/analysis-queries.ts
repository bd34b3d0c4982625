import { queryOptions } from '@tanstack/svelte-query';
import type { UnitSystem } from '$lib/model/quantities';
import type { Comparison } from '$lib/model/wire/comparison';
import type { Nights } from '$lib/model/wire/nights';
import type { Season } from '$lib/model/wire/season';
import type { Suspects } from '$lib/model/wire/start';
import type { StartSheet } from '$lib/model/wire/start-sheet';
import { getJson, pathWith } from './api';

/** One start with its clues, neighbours and advice. */
export function startSheetQuery(fetcher: typeof fetch, start: string, system: UnitSystem) {
	return queryOptions({
		queryKey: ['starts', start, system],
		queryFn: () => getJson<StartSheet>(fetcher, pathWith(`/api/starts/${start}`, { units: system }))
	});
}

/** What the pages ask about a circuit's suspects. */
export type CircuitWindow = { circuit: string | null; from: string | null; to: string | null };

export function suspectsQuery(fetcher: typeof fetch, unit: string, window: CircuitWindow, system: UnitSystem) {
	return queryOptions({
		queryKey: ['units', unit, 'suspects', window, system],
		queryFn: () => getJson<Suspects>(fetcher, pathWith(`/api/units/${unit}/suspects`, { ...window, units: system }))
	});
}

export function nightsQuery(fetcher: typeof fetch, unit: string, circuit: string | null, system: UnitSystem) {
	return queryOptions({
		queryKey: ['units', unit, 'nights', circuit, system],
		queryFn: () => getJson<Nights>(fetcher, pathWith(`/api/units/${unit}/nights`, { circuit, units: system }))
	});
}

/** Weekly medians over thirteen weeks. */
export function seasonQuery(fetcher: typeof fetch, unit: string, circuit: string | null, system: UnitSystem) {
	return queryOptions({
		queryKey: ['units', unit, 'season', circuit, system],
		queryFn: () => getJson<Season>(fetcher, pathWith(`/api/units/${unit}/season`, { circuit, units: system }))
	});
}

/** Two groups of starts: expressions or ids. */
export type Groups = { a: string | null; b: string | null; circuit: string | null };

export function comparisonQuery(fetcher: typeof fetch, unit: string, groups: Groups, system: UnitSystem) {
	return queryOptions({
		queryKey: ['units', unit, 'comparison', groups, system],
		queryFn: () => getJson<Comparison>(fetcher, pathWith(`/api/units/${unit}/comparison`, { ...groups, units: system }))
	});
}
