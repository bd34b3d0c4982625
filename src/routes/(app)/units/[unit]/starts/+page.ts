import { allStartsQuery } from '$lib/state/queries';
import { instantsOf } from '$lib/state/window';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, params, url }) => {
	const { queryClient, preferences, site } = await parent();
	await queryClient.prefetchQuery(
		allStartsQuery(fetch, params.unit, instantsOf(url, site.timeZone), preferences.units)
	);
};
