import { describe, expect, it } from 'vitest';
import { may, maySeeSite, type Actor } from './people';

const actor = (over: Partial<Actor>): Actor => ({
	organisationId: 'o',
	personId: 'p',
	name: 'N',
	email: 'n@firstpull.test',
	role: 'engineer',
	siteIds: null,
	via: 'session',
	scopes: null,
	...over
});

describe('may', () => {
	it('lets a client read and nothing else', () => {
		const client = actor({ role: 'client' });
		expect(may(client, 'read')).toBe(true);
		for (const right of ['readSuspects', 'logs', 'field', 'plant', 'plan', 'office', 'readOffice'] as const) {
			expect(may(client, right), right).toBe(false);
		}
	});
	it('narrows a key to its scopes, never widens the role', () => {
		expect(may(actor({ scopes: ['logs'] }), 'logs')).toBe(true);
		expect(may(actor({ scopes: ['logs'] }), 'plant')).toBe(false);
		expect(may(actor({ role: 'client', scopes: ['write'] }), 'plant')).toBe(false);
	});
});

it('keeps sites apart', () => {
	expect(maySeeSite(actor({ siteIds: ['a'] }), 'b')).toBe(false);
	expect(maySeeSite(actor({ siteIds: null }), 'b')).toBe(true);
});
