import type { Hit } from '$lib/model/wire/office';
import { describe, expect, it } from 'vitest';
import { mergeHits, searchRecords } from './find-records';

// Invented records.
const hit = (kind: Hit['kind'], title: string, href: string): Hit => ({ kind, title, detail: 'Quay Street', href });
const unit = { href: '/units/1', tag: 'KM-2', site: 'Alder Mill' };

describe('mergeHits', () => {
	const records = { text: 'km', hits: [hit('unit', 'KM-2', '/units/1'), hit('case', 'C-4, KM-2', '/cases/4')] };
	it('shows units first and no unit twice', () => {
		expect(mergeHits([unit], records, 'km').map(({ href }) => href)).toEqual(['/units/1', '/cases/4']);
	});
	it('keeps narrowing what it has while the next answer is on its way, and drops what no longer goes on', () => {
		expect(mergeHits([], records, 'km quay').map(({ href }) => href)).toEqual(['/units/1', '/cases/4']);
		expect(mergeHits([], records, 'km c-4').map(({ href }) => href)).toEqual(['/cases/4']);
		expect(mergeHits([], records, 'k')).toEqual([]);
	});
});

describe('searchRecords', () => {
	const { signal } = new AbortController();
	it('asks for the text as it is typed', async () => {
		const asked: string[] = [];
		const fetcher = (async (path: string) => {
			asked.push(path);
			return new Response(JSON.stringify({ hits: [hit('case', 'C-1', '/cases/1')] }));
		}) as typeof fetch;
		expect(await searchRecords(fetcher, 'a & b', signal)).toHaveLength(1);
		expect(asked).toEqual(['/api/search?q=a%20%26%20b']);
	});
	it('gives null when it is refused or nothing answers', async () => {
		const refusing = (async () => new Response('', { status: 500 })) as typeof fetch;
		expect(await searchRecords(refusing, 'ab', signal)).toBeNull();
		const broken = (async () => Promise.reject(new TypeError('no connection'))) as typeof fetch;
		expect(await searchRecords(broken, 'ab', signal)).toBeNull();
	});
});
