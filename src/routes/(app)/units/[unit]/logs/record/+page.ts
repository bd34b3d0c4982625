import { recordQuery } from '$lib/state/queries';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, params }) => {
	const { queryClient, preferences } = await parent();
	await queryClient.prefetchQuery(recordQuery(fetch, params.unit, preferences.units));
};
