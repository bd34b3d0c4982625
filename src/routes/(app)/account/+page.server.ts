import { sessionsOf } from '$lib/server/services/office';
import { actorOf } from '$lib/server/web/endpoint';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => ({ sessions: await sessionsOf(actorOf(event)) });
