import { seasonQuery } from '$lib/state/analysis-queries';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, params, url }) => {
	const { queryClient, preferences } = await parent();
	const circuit = url.searchParams.get('circuit');
	await queryClient.prefetchQuery(seasonQuery(fetch, params.unit, circuit, preferences.units));
	return { circuit };
};
