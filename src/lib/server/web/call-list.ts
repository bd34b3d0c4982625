import { RIGHTS, ROLE_NAMES } from '$lib/model/people';
import { OPERATIONS } from './operations';

export type CallGroup = { name: string; calls: { method: string; path: string; summary: string; who: string }[] };

/** The public API's calls by their first word, for a person to read. */
export function callsOf(): CallGroup[] {
	const groups = new Map<string, CallGroup>();
	for (const { method, path, summary, right } of OPERATIONS) {
		const name = path.split('/')[2] ?? '';
		const group = groups.get(name) ?? { name, calls: [] };
		const roles = RIGHTS[right];
		const who = roles.length === 5 ? 'every member' : roles.map((role) => ROLE_NAMES[role]).join(', ');
		group.calls.push({ method: method.toUpperCase(), path, summary, who });
		groups.set(name, group);
	}
	return [...groups.values()].sort((a, b) => (a.name < b.name ? -1 : 1));
}
