import { casesQuery } from '$lib/state/circle-queries';
import { plainUnitsQuery, sitesQuery } from '$lib/state/queries';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch }) => {
	const { queryClient } = await parent();
	await Promise.all([
		queryClient.prefetchQuery(casesQuery(fetch)),
		queryClient.prefetchQuery(plainUnitsQuery(fetch)),
		queryClient.prefetchQuery(sitesQuery(fetch))
	]);
};
