import { jobsOf } from '$lib/server/services/office';
import { actorOf } from '$lib/server/web/endpoint';

export const load = async (event) => ({ jobs: await jobsOf(actorOf(event)) });
