import { error } from '@sveltejs/kit';
import { ApiError } from '$lib/state/api';
import { logQuery, previewQuery, unitsQuery } from '$lib/state/queries';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, params }) => {
	const { queryClient, site } = await parent();
	try {
		const log = await queryClient.fetchQuery(logQuery(fetch, params.log));
		await Promise.all([
			queryClient.prefetchQuery(previewQuery(fetch, params.log)),
			queryClient.prefetchQuery(unitsQuery(fetch, site.id))
		]);
		return { logName: log.name };
	} catch (failure) {
		if (failure instanceof ApiError) error(failure.status, failure.message);
		throw failure;
	}
};
