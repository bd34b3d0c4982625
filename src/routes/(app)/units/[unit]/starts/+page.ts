import { startsQuery } from '$lib/state/queries';
import { windowOf } from '$lib/state/window';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, params, url }) => {
	const { queryClient, preferences } = await parent();
	await queryClient.prefetchQuery(startsQuery(fetch, params.unit, windowOf(url), preferences.units));
};
