import { mailsOf } from '$lib/server/services/mails';
import { actorOf } from '$lib/server/web/endpoint';

export const load = async (event) => ({ mails: await mailsOf(actorOf(event)) });
