import { error, redirect } from '@sveltejs/kit';
import { startSheetQuery } from '$lib/state/analysis-queries';
import { ApiError } from '$lib/state/api';
import type { PageLoad } from './$types';

/** The start and what is said of it; its traces follow from the browser, onto paper that is there already. */
export const load: PageLoad = async ({ parent, fetch, params }) => {
	const { queryClient, preferences } = await parent();
	try {
		const sheet = await queryClient.ensureQueryData(startSheetQuery(fetch, params.start, preferences.units));
		// Without a trend log there is nothing to draw: its place is in the record.
		if (sheet.start.source !== 'log') redirect(307, `/units/${params.unit}/logs/record#${params.start}`);
		return { startId: params.start, sheet };
	} catch (failure) {
		if (failure instanceof ApiError) error(failure.status, failure.message);
		throw failure;
	}
};
