import { confirmEmailChange } from '$lib/server/services/account';
import { actorOf } from '$lib/server/web/endpoint';
import { withForm } from '$lib/server/web/form';
import { linkSchema } from '$lib/model/wire/entry';
import { redirect } from '@sveltejs/kit';

export const load = ({ url }) => ({ token: url.searchParams.get('token') ?? '' });

export const actions = {
	default: async (event) =>
		withForm(event.request, linkSchema, async ({ token }) => {
			await confirmEmailChange(actorOf(event), token);
			redirect(303, '/account');
		})
};
