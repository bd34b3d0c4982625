import { membersOf } from '$lib/server/services/members';
import { actorOf } from '$lib/server/web/endpoint';

export const load = async (event) => membersOf(actorOf(event));
