import { methodQuery } from '$lib/state/queries';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch }) => {
	const { queryClient } = await parent();
	await queryClient.prefetchQuery(methodQuery(fetch));
};
