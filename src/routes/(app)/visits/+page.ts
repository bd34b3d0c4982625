import { RIGHTS } from '$lib/model/people';
import { colleaguesQuery, planQuery, visitsQuery } from '$lib/state/circle-queries';
import { daysFrom } from '$lib/components/visits/visit-words';
import { isoDate } from '$lib/utils/clock';
import type { PageLoad } from './$types';

export const load: PageLoad = async ({ parent, fetch, url }) => {
	const { queryClient, person, now } = await parent();
	const from = url.searchParams.get('from') ?? isoDate(now, 'UTC');
	const days = daysFrom(from, 7);
	const prefetches = [queryClient.prefetchQuery(visitsQuery(fetch))];
	if ((RIGHTS.readSuspects as readonly string[]).includes(person.role))
		prefetches.push(
			queryClient.prefetchQuery(planQuery(fetch, days[0] ?? from, days.at(-1) ?? from)),
			queryClient.prefetchQuery(colleaguesQuery(fetch))
		);
	await Promise.all(prefetches);
	return { days };
};
