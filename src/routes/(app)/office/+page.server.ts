import { AppError } from '$lib/model/errors';
import { ROLES, type Role } from '$lib/model/people';
import { makeKey, revokeKey } from '$lib/server/services/keys';
import { officeOf } from '$lib/server/services/office';
import { actorOf } from '$lib/server/web/endpoint';
import { error, fail } from '@sveltejs/kit';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	try {
		return { desk: await officeOf(actorOf(event)) };
	} catch (problem) {
		if (problem instanceof AppError) error(403, { message: 'The office is for its owner and its managers.' });
		throw problem;
	}
};

export const actions: Actions = {
	key: async (event) => {
		const form = await event.request.formData();
		const name = String(form.get('name') ?? '').trim();
		const role = String(form.get('role') ?? 'engineer') as Role;
		if (name === '' || !ROLES.includes(role)) return fail(422, { name, message: 'Give the key a name and a role.' });
		try {
			const made = await makeKey(actorOf(event), { name, role, scopes: ['write'], siteIds: null, expiresAt: null });
			return { made: made.key };
		} catch (problem) {
			if (problem instanceof AppError) return fail(422, { name, message: problem.message });
			throw problem;
		}
	},
	revoke: async (event) => {
		const id = String((await event.request.formData()).get('id') ?? '');
		await revokeKey(actorOf(event), id);
		return { revoked: true };
	}
};
