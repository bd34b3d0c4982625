import { summaryQuery } from '$lib/state/queries';
import type { PageLoad } from './$types';

/** Fetches the units before the page is drawn; a failure shows on the page itself. */
export const load: PageLoad = async ({ parent, fetch }) => {
	const { queryClient, preferences } = await parent();
	await queryClient.prefetchQuery(summaryQuery(fetch, preferences.units));
};
