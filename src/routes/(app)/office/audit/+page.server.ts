import { auditOf } from '$lib/server/services/office';
import { actorOf } from '$lib/server/web/endpoint';
import { error } from '@sveltejs/kit';

const LINES = 100;

export const load = async (event) => {
	if (!(await event.parent()).owner) error(403, { message: 'The audit trail is the owner’s.' });
	const asked = Number(event.url.searchParams.get('before'));
	const before = Number.isSafeInteger(asked) && asked > 0 ? asked : undefined;
	const lines = await auditOf(actorOf(event), { limit: LINES, before });
	return { lines, newest: before === undefined, older: lines.length === LINES ? (lines.at(-1)?.id ?? null) : null };
};
