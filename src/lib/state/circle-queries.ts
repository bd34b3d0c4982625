import { queryOptions } from '@tanstack/svelte-query';
import type { UnitSystem } from '$lib/model/quantities';
import type { Case, CaseRow, CaseSuggestion } from '$lib/model/wire/case';
import type { Balance, Change, Check } from '$lib/model/wire/field';
import type { Brief, PlanRow, Report, Visit } from '$lib/model/wire/visit';
import type { CheckUnit } from '$lib/utils/field-check';
import { getJson, pathWith } from './api';

/** What the pages of the circle ask: checks, changes, cases, visits. */

export function checksQuery(fetcher: typeof fetch, unit: string, system: UnitSystem) {
	return queryOptions({
		queryKey: ['units', unit, 'checks', system],
		queryFn: () =>
			getJson<{ checks: Check[] }>(fetcher, pathWith(`/api/units/${unit}/checks`, { units: system, limit: '5000' }))
	});
}

export type Changes = { changes: Change[]; oil: Balance; refrigerant: Balance };
export function changesQuery(fetcher: typeof fetch, unit: string) {
	return queryOptions({
		queryKey: ['units', unit, 'changes'],
		queryFn: () => getJson<Changes>(fetcher, `/api/units/${unit}/changes?limit=5000`)
	});
}

export function checkFormQuery(fetcher: typeof fetch, unit: string) {
	return queryOptions({
		queryKey: ['units', unit, 'check-form'],
		queryFn: () => getJson<CheckUnit>(fetcher, `/api/units/${unit}/check-form`),
		staleTime: 300_000
	});
}

export type CasesPage = { cases: CaseRow[]; suggestions?: CaseSuggestion[] };
export function casesQuery(fetcher: typeof fetch) {
	return queryOptions({
		queryKey: ['cases'],
		queryFn: () => getJson<CasesPage>(fetcher, '/api/cases?limit=5000&suggestions=yes')
	});
}

export function caseQuery(fetcher: typeof fetch, id: string, system: UnitSystem) {
	return queryOptions({
		queryKey: ['cases', id, system],
		queryFn: () => getJson<Case>(fetcher, pathWith(`/api/cases/${id}`, { units: system }))
	});
}

export function visitsQuery(fetcher: typeof fetch) {
	return queryOptions({
		queryKey: ['visits'],
		queryFn: () => getJson<{ visits: Visit[] }>(fetcher, '/api/visits?limit=5000')
	});
}

export function visitQuery(fetcher: typeof fetch, id: string) {
	return queryOptions({ queryKey: ['visits', id], queryFn: () => getJson<Visit>(fetcher, `/api/visits/${id}`) });
}

export function planQuery(fetcher: typeof fetch, from: string, to: string) {
	return queryOptions({
		queryKey: ['visit-plan', from, to],
		queryFn: () => getJson<{ rows: PlanRow[] }>(fetcher, pathWith('/api/visit-plan', { from, to }))
	});
}

export function briefQuery(fetcher: typeof fetch, visit: string, system: UnitSystem) {
	return queryOptions({
		queryKey: ['visits', visit, 'brief', system],
		queryFn: () => getJson<Brief>(fetcher, pathWith(`/api/visits/${visit}/brief`, { units: system }))
	});
}

export function reportQuery(fetcher: typeof fetch, visit: string, system: UnitSystem) {
	return queryOptions({
		queryKey: ['visits', visit, 'report', system],
		queryFn: () => getJson<Report>(fetcher, pathWith(`/api/visits/${visit}/report`, { units: system }))
	});
}

export type Member = { id: string; name: string; role: string };
/** Members who may be given work, by name. */
export function colleaguesQuery(fetcher: typeof fetch) {
	return queryOptions({
		queryKey: ['colleagues'],
		queryFn: () => getJson<{ colleagues: Member[] }>(fetcher, '/api/colleagues'),
		staleTime: 300_000
	});
}
