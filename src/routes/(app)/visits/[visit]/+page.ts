import { error } from '@sveltejs/kit';
import { RIGHTS } from '$lib/model/people';
import { ApiError } from '$lib/state/api';
import { briefQuery, reportQuery, visitQuery } from '$lib/state/circle-queries';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, params }) => {
	const { queryClient, preferences, person } = await parent();
	const inside = (RIGHTS.readSuspects as readonly string[]).includes(person.role);
	try {
		await Promise.all([
			queryClient.fetchQuery(visitQuery(fetch, params.visit)),
			queryClient.prefetchQuery(reportQuery(fetch, params.visit, preferences.units)),
			...(inside ? [queryClient.prefetchQuery(briefQuery(fetch, params.visit, preferences.units))] : [])
		]);
	} catch (failure) {
		if (failure instanceof ApiError) error(failure.status, failure.message);
		throw failure;
	}
	return { inside };
};
