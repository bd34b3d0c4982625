import { logsQuery } from '$lib/state/queries';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, params }) => {
	const { queryClient } = await parent();
	await queryClient.prefetchQuery(logsQuery(fetch, params.unit));
};
