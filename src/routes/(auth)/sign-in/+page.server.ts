import { AppError } from '$lib/model/errors';
import { SESSION_COOKIE } from '$lib/server/auth/sessions';
import { demoSignIns, isFirstRun } from '$lib/server/services/first-run';
import { signIn } from '$lib/server/services/people';
import { sessionCookie } from '$lib/server/web/cookies';
import { fail, redirect } from '@sveltejs/kit';

/** Only a path of our own may follow a sign-in. */
function after(url: URL): string {
	const next = url.searchParams.get('next') ?? '/';
	return /^\/(?![/\\])/.test(next) ? next : '/';
}

export const load = async ({ locals, url }) => {
	if (locals.actor) redirect(303, after(url));
	if (await isFirstRun()) redirect(303, '/first-run');
	return { demo: await demoSignIns() };
};

export const actions = {
	default: async ({ request, cookies, url, getClientAddress }) => {
		const form = await request.formData();
		const email = String(form.get('email') ?? '').trim();
		const password = String(form.get('password') ?? '');
		if (!email || !password) return fail(422, { email, message: 'Give both the address and the password.' });
		try {
			const { token, expiresAt } = await signIn(email, password, getClientAddress(), request.headers.get('user-agent'));
			cookies.set(SESSION_COOKIE, token, sessionCookie(url, expiresAt));
		} catch (error) {
			if (!(error instanceof AppError)) throw error;
			return fail(error.kind === 'too-many' ? 429 : 400, { email, message: error.message });
		}
		redirect(303, after(url));
	}
};
