import { browser } from '$app/environment';
import { QueryClient, queryOptions } from '@tanstack/svelte-query';
import type { UnitSystem } from '$lib/model/quantities';
import type { Log, LogPreview } from '$lib/model/wire/log';
import type { Method } from '$lib/model/wire/method';
import type { UnitRecord } from '$lib/model/wire/noted';
import type { Site, Unit } from '$lib/model/wire/site-unit';
import type { Start } from '$lib/model/wire/start';
import type { TripWords } from '$lib/model/wire/trip-word';
import type { Upload } from '$lib/model/wire/upload';
import type { Days, UnitSummary } from '$lib/model/wire/views';
import { ApiError, getJson, pathWith } from './api';

/** The pages' store of API answers: one a request on the server, one for the whole visit in the browser. */
let shared: QueryClient | undefined;

function makeClient(): QueryClient {
	return new QueryClient({
		defaultOptions: {
			queries: {
				// The server load has fetched already; during server rendering nothing more is asked.
				enabled: browser,
				staleTime: 30_000,
				retry: (failures, error) => failures < 2 && !(error instanceof ApiError && error.status < 500)
			}
		}
	});
}

/** The query client of this page. */
export function queryClient(): QueryClient {
	if (!browser) return makeClient();
	shared ??= makeClient();
	return shared;
}

export type Summary = { units: UnitSummary[]; title: string };

/** Every unit with its counts, worst repeater first. */
export function summaryQuery(fetcher: typeof fetch, system: UnitSystem) {
	return queryOptions({
		queryKey: ['units', 'summary', system],
		queryFn: () => getJson<Summary>(fetcher, pathWith('/api/units', { view: 'summary', units: system })),
		// Logs of the demo or of a colleague come in while the page is open.
		refetchInterval: (query) => (query.state.data?.units.some((row) => row.logs.reading > 0) ? 4000 : 60_000)
	});
}

/** Every unit as it is set up, without its starts. */
export function plainUnitsQuery(fetcher: typeof fetch) {
	return queryOptions({
		queryKey: ['units', 'plain'],
		queryFn: () => getJson<{ units: Unit[] }>(fetcher, '/api/units?limit=5000')
	});
}

export function sitesQuery(fetcher: typeof fetch) {
	return queryOptions({
		queryKey: ['sites'],
		queryFn: () => getJson<{ sites: Site[] }>(fetcher, '/api/sites?limit=5000')
	});
}

/** The units of one site. */
export function unitsQuery(fetcher: typeof fetch, site: string) {
	return queryOptions({
		queryKey: ['units', 'of', site],
		queryFn: () => getJson<{ units: Unit[] }>(fetcher, pathWith('/api/units', { site, limit: '500' }))
	});
}

export function unitQuery(fetcher: typeof fetch, unit: string) {
	return queryOptions({ queryKey: ['units', unit], queryFn: () => getJson<Unit>(fetcher, `/api/units/${unit}`) });
}

export function siteQuery(fetcher: typeof fetch, site: string) {
	return queryOptions({ queryKey: ['sites', site], queryFn: () => getJson<Site>(fetcher, `/api/sites/${site}`) });
}

/** What a unit's days and starts are asked for with. */
export type Window = { from: string | null; to: string | null; circuit: string | null };

export function daysQuery(fetcher: typeof fetch, unit: string, window: Window, system: UnitSystem) {
	return queryOptions({
		queryKey: ['units', unit, 'days', window, system],
		queryFn: () => getJson<Days>(fetcher, pathWith(`/api/units/${unit}/days`, { ...window, units: system }))
	});
}

export type StartsPage = { starts: Start[]; nextCursor: string | null; units?: Record<string, string> };

export function startsQuery(fetcher: typeof fetch, unit: string, window: Window, system: UnitSystem) {
	return queryOptions({
		queryKey: ['units', unit, 'starts', window, system],
		queryFn: () =>
			getJson<StartsPage>(fetcher, pathWith(`/api/units/${unit}/starts`, { ...window, units: system, limit: '5000' }))
	});
}

/** Starts with and without a trend log, as one list. */
export function allStartsQuery(fetcher: typeof fetch, unit: string, window: Window, system: UnitSystem) {
	return queryOptions({
		queryKey: ['units', unit, 'starts', 'all', window, system],
		queryFn: () => {
			const path = pathWith(`/api/units/${unit}/starts`, { ...window, source: 'all', units: system, limit: '5000' });
			return getJson<StartsPage>(fetcher, path);
		}
	});
}

export function recordQuery(fetcher: typeof fetch, unit: string, system: UnitSystem) {
	return queryOptions({
		queryKey: ['units', unit, 'record', system],
		queryFn: () => getJson<UnitRecord>(fetcher, pathWith(`/api/units/${unit}/record`, { units: system }))
	});
}

export function logsQuery(fetcher: typeof fetch, unit: string) {
	return queryOptions({
		queryKey: ['units', unit, 'logs'],
		queryFn: () => getJson<{ logs: Log[] }>(fetcher, `/api/units/${unit}/logs?limit=500`)
	});
}

export function tripWordsQuery(fetcher: typeof fetch, unit: string) {
	return queryOptions({
		queryKey: ['units', unit, 'trip-words'],
		queryFn: () => getJson<TripWords>(fetcher, `/api/units/${unit}/trip-words`)
	});
}

/** One's own uploads in parts that are not a log yet. */
export function openUploadsQuery(fetcher: typeof fetch, unit: string) {
	return queryOptions({
		queryKey: ['units', unit, 'uploads'],
		queryFn: () => getJson<{ uploads: Upload[] }>(fetcher, `/api/units/${unit}/uploads`)
	});
}

export function logQuery(fetcher: typeof fetch, log: string) {
	return queryOptions({ queryKey: ['logs', log], queryFn: () => getJson<Log>(fetcher, `/api/logs/${log}`) });
}

/** What the reader noted of each signal, for the quality report. */
export type SignalNotes = {
	column: string;
	signal: string;
	spacingSeconds: number | null;
	logging: string;
	bad: number;
	circuit: string;
	/** stretches with readings, ms UTC */
	covered: { from: number; to: number }[];
	notes: string[];
};

export function previewQuery(fetcher: typeof fetch, log: string) {
	return queryOptions({
		queryKey: ['logs', log, 'preview'],
		queryFn: () => getJson<LogPreview & { signals?: SignalNotes[] }>(fetcher, `/api/logs/${log}/preview`)
	});
}

export function methodQuery(fetcher: typeof fetch) {
	return queryOptions({
		queryKey: ['method'],
		queryFn: () => getJson<Method>(fetcher, '/api/method'),
		staleTime: Infinity
	});
}
