import { endAllSessions, endSession, SESSION_COOKIE } from '$lib/server/auth/sessions';
import { redirect } from '@sveltejs/kit';

export const load = () => redirect(303, '/');

export const actions = {
	default: async ({ cookies, locals, request }) => {
		const token = cookies.get(SESSION_COOKIE);
		const everywhere = (await request.formData()).get('everywhere') === 'yes';
		if (everywhere && locals.actor) await endAllSessions(locals.actor.personId);
		else if (token) await endSession(token);
		cookies.delete(SESSION_COOKIE, { path: '/' });
		redirect(303, '/sign-in');
	}
};
