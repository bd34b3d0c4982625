import { startsQuery } from '$lib/state/queries';
import { suspectsQuery } from '$lib/state/analysis-queries';
import { windowOf } from '$lib/state/window';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, params, url }) => {
	const { queryClient, preferences } = await parent();
	const window = windowOf(url);
	await Promise.all([
		queryClient.prefetchQuery(suspectsQuery(fetch, params.unit, window, preferences.units)),
		queryClient.prefetchQuery(startsQuery(fetch, params.unit, window, preferences.units))
	]);
};
