import { error } from '@sveltejs/kit';
import { ApiError } from '$lib/state/api';
import { siteQuery, unitQuery } from '$lib/state/queries';
import type { LayoutLoad } from './$types';

/** The unit and its site, for every sheet below. What a person may not know of is not found. */
export const load: LayoutLoad = async ({ parent, fetch, params, data }) => {
	const { queryClient } = await parent();
	try {
		const unit = await queryClient.fetchQuery(unitQuery(fetch, params.unit));
		const site = await queryClient.fetchQuery(siteQuery(fetch, unit.siteId));
		return { ...data, unit, site };
	} catch (failure) {
		if (failure instanceof ApiError) error(failure.status, failure.message);
		throw failure;
	}
};
