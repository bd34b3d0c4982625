import { foundSchema } from '$lib/model/wire/entry';
import { SESSION_COOKIE } from '$lib/server/auth/sessions';
import { foundWithCode, isFirstRun } from '$lib/server/services/first-run';
import { signIn } from '$lib/server/services/people';
import { sessionCookie } from '$lib/server/web/cookies';
import { withForm } from '$lib/server/web/form';
import { redirect } from '@sveltejs/kit';

export const load = async () => {
	if (!(await isFirstRun())) redirect(303, '/sign-in');
};

export const actions = {
	default: async ({ request, cookies, url, getClientAddress }) => {
		const agent = request.headers.get('user-agent');
		return withForm(request, foundSchema, async (input) => {
			await foundWithCode(input);
			const { token, expiresAt } = await signIn(input.email, input.password, getClientAddress(), agent);
			cookies.set(SESSION_COOKIE, token, sessionCookie(url, expiresAt));
			redirect(303, '/');
		});
	}
};
