import { error } from '@sveltejs/kit';
import { ApiError } from '$lib/state/api';
import { caseQuery, colleaguesQuery } from '$lib/state/circle-queries';
import { RIGHTS } from '$lib/model/people';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, params }) => {
	const { queryClient, preferences, person } = await parent();
	if ((RIGHTS.readSuspects as readonly string[]).includes(person.role))
		await queryClient.prefetchQuery(colleaguesQuery(fetch));
	try {
		await queryClient.fetchQuery(caseQuery(fetch, params.case, preferences.units));
	} catch (failure) {
		if (failure instanceof ApiError) error(failure.status, failure.message);
		throw failure;
	}
};
