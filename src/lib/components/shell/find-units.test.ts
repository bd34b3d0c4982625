import { describe, expect, it } from 'vitest';
import { findUnits, loadFindable } from './find-units';

// Invented names.
const all = [
	{ href: '/units/1', tag: 'KM-2', site: 'Alder Mill' },
	{ href: '/units/2', tag: 'AL-1', site: 'Quay Street' },
	{ href: '/units/3', tag: 'KM-1', site: 'Quay Street' }
];

describe('findUnits', () => {
	it('wants every word, in tag or site', () => {
		expect(findUnits(all, 'km quay').map((u) => u.href)).toEqual(['/units/3']);
	});
	it('puts tags that begin with the word before sites that do', () => {
		expect(findUnits(all, 'al').map((u) => u.href)).toEqual(['/units/2', '/units/1']);
	});
	it('finds nothing for an empty text', () => {
		expect(findUnits(all, '  ')).toEqual([]);
	});
});

describe('loadFindable', () => {
	it('joins units with their sites, and refuses a refusal', async () => {
		const answers: Record<string, unknown> = {
			'/api/units?limit=5000': { units: [{ id: 'u', siteId: 's', tag: 'KM-9' }] },
			'/api/sites?limit=5000': { sites: [{ id: 's', name: 'Alder Mill' }] }
		};
		const fetcher = (async (path: string) => new Response(JSON.stringify(answers[path]))) as typeof fetch;
		expect(await loadFindable(fetcher)).toEqual([{ href: '/units/u', tag: 'KM-9', site: 'Alder Mill' }]);
		const refusing = (async () => new Response('', { status: 401 })) as typeof fetch;
		await expect(loadFindable(refusing)).rejects.toThrow('401');
	});
});
