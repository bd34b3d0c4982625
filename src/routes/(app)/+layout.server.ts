import { describeMe } from '$lib/server/services/people';
import { now } from '$lib/server/config';
import { redirect } from '@sveltejs/kit';

export const load = async ({ locals, depends }) => {
	depends('app:me');
	if (!locals.actor) redirect(303, '/sign-in');
	const me = await describeMe(locals.actor, locals.preferences);
	return {
		person: { id: me.id, name: me.name, email: me.email, role: me.role },
		preferences: me.preferences,
		office: { name: me.office },
		now: now().toISOString()
	};
};
