import { askResetSchema, resetSchema } from '$lib/model/wire/entry';
import { askReset, resetPassword, resetStands } from '$lib/server/services/password-reset';
import { withForm } from '$lib/server/web/form';
import { redirect } from '@sveltejs/kit';

export const load = async ({ url }) => {
	const token = url.searchParams.get('token');
	return { token, stands: token === null ? null : await resetStands(token) };
};

export const actions = {
	ask: async ({ request, getClientAddress }) =>
		withForm(request, askResetSchema, async ({ email }) => {
			await askReset(email, getClientAddress());
			return { asked: true };
		}),
	reset: async ({ request }) =>
		withForm(request, resetSchema, async ({ token, password }) => {
			await resetPassword(token, password);
			redirect(303, '/sign-in?said=password');
		})
};
