import { AppError } from '$lib/model/errors';
import { SESSION_COOKIE } from '$lib/server/auth/sessions';
import { foundWithCode, isFirstRun } from '$lib/server/services/first-run';
import { signIn } from '$lib/server/services/people';
import { sessionCookie } from '$lib/server/web/cookies';
import { fail, redirect } from '@sveltejs/kit';

export const load = async () => {
	if (!(await isFirstRun())) redirect(303, '/sign-in');
};

export const actions = {
	default: async ({ request, cookies, url, getClientAddress }) => {
		const form = await request.formData();
		const text = (name: string): string => String(form.get(name) ?? '').trim();
		const kept = { code: text('code'), office: text('office'), name: text('name'), email: text('email') };
		const password = String(form.get('password') ?? '');
		try {
			await foundWithCode({ ...kept, password });
			const { token, expiresAt } = await signIn(
				kept.email,
				password,
				getClientAddress(),
				request.headers.get('user-agent')
			);
			cookies.set(SESSION_COOKIE, token, sessionCookie(url, expiresAt));
		} catch (error) {
			if (!(error instanceof AppError)) throw error;
			return fail(422, { ...kept, message: error.message, field: error.errors[0]?.field ?? null });
		}
		redirect(303, '/');
	}
};
