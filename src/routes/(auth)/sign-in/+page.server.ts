import { AppError } from '$lib/model/errors';
import { SESSION_COOKIE } from '$lib/server/auth/sessions';
import { demoSignIns, isFirstRun } from '$lib/server/services/first-run';
import { signIn } from '$lib/server/services/people';
import { hasProvider } from '$lib/server/services/provider-sign-in';
import { sessionCookie } from '$lib/server/web/cookies';
import { ownPath } from '$lib/server/web/own-path';
import { fail, redirect } from '@sveltejs/kit';

/** What is said when somebody comes back; the address names it, never its words. */
const WORDS: Readonly<Record<string, { title: string; wrong: boolean }>> = {
	slow: { title: 'The sign-in at the identity provider took too long. Begin again.', wrong: true },
	provider: { title: 'The sign-in through the identity provider did not hold. Begin again.', wrong: true },
	silent: { title: 'The identity provider does not answer. Sign in with a password, or try later.', wrong: true },
	stranger: { title: 'The identity provider knows you, this office does not. Ask it for an invitation.', wrong: true },
	password: { title: 'Your new password is kept. Sign in with it.', wrong: false },
	joined: { title: 'You are a member now. Sign in.', wrong: false }
};

const after = (url: URL): string => ownPath(url.searchParams.get('next'));

export const load = async ({ locals, url }) => {
	if (locals.actor) redirect(303, after(url));
	if (await isFirstRun()) redirect(303, '/first-run');
	const next = url.searchParams.get('next');
	return {
		demo: await demoSignIns(),
		provider: hasProvider() ? `/sign-in/provider${next ? `?next=${encodeURIComponent(next)}` : ''}` : null,
		said: WORDS[url.searchParams.get('said') ?? ''] ?? null
	};
};

export const actions = {
	default: async ({ request, cookies, url, getClientAddress }) => {
		const form = await request.formData();
		const email = String(form.get('email') ?? '').trim();
		const password = String(form.get('password') ?? '');
		const code = String(form.get('code') ?? '');
		if (!email || !password)
			return fail(422, { email, message: 'Give both the address and the password.', needsCode: false });
		try {
			const agent = request.headers.get('user-agent');
			const { token, expiresAt } = await signIn(email, password, getClientAddress(), agent, code);
			cookies.set(SESSION_COOKIE, token, sessionCookie(url, expiresAt));
		} catch (error) {
			if (!(error instanceof AppError)) throw error;
			const needsCode = error.errors.some(({ field }) => field === 'code');
			return fail(error.kind === 'too-many' ? 429 : 400, { email, message: error.message, needsCode });
		}
		redirect(303, after(url));
	}
};
