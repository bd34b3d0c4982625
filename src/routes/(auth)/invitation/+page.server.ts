import { ROLE_NAMES } from '$lib/model/people';
import { acceptSchema, linkSchema } from '$lib/model/wire/entry';
import { acceptInvitation, invitationOf } from '$lib/server/services/members';
import { withForm } from '$lib/server/web/form';
import { redirect } from '@sveltejs/kit';

export const load = async ({ url }) => {
	const token = url.searchParams.get('token') ?? '';
	const found = token ? await invitationOf(token) : null;
	const invitation = found && {
		office: found.office,
		email: found.email,
		name: found.name,
		role: ROLE_NAMES[found.role],
		known: found.known
	};
	return { token, invitation };
};

export const actions = {
	accept: async ({ request }) =>
		withForm(request, acceptSchema, async ({ token, ...person }) => {
			await acceptInvitation(token, person);
			redirect(303, '/sign-in?said=joined');
		}),
	/** Who is a member somewhere already keeps name and password. */
	join: async ({ request }) =>
		withForm(request, linkSchema, async ({ token }) => {
			await acceptInvitation(token, null);
			redirect(303, '/sign-in?said=joined');
		})
};
