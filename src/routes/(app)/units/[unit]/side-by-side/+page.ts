import { comparisonQuery } from '$lib/state/analysis-queries';
import type { PageLoad } from './$types';

/** The groups stand in the address, so that a link shows the same comparison. */
export const load: PageLoad = async ({ parent, fetch, params, url }) => {
	const { queryClient, preferences } = await parent();
	const groups = {
		a: url.searchParams.get('a'),
		b: url.searchParams.get('b'),
		circuit: url.searchParams.get('circuit')
	};
	await queryClient.prefetchQuery(comparisonQuery(fetch, params.unit, groups, preferences.units));
	return { groups };
};
