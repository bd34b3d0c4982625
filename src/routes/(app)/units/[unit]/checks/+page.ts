import { changesQuery, checkFormQuery, checksQuery } from '$lib/state/circle-queries';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, params }) => {
	const { queryClient, preferences } = await parent();
	await Promise.all([
		queryClient.prefetchQuery(checksQuery(fetch, params.unit, preferences.units)),
		queryClient.prefetchQuery(changesQuery(fetch, params.unit)),
		queryClient.prefetchQuery(checkFormQuery(fetch, params.unit))
	]);
};
