import { callsOf } from '$lib/server/web/call-list';
import { now } from '$lib/server/config';

export const load = () => ({ groups: callsOf(), now: now().toISOString() });
