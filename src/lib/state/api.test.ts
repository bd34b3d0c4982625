import { afterEach, describe, expect, it, vi } from 'vitest';
import { ApiError, getJson, pathWith, problemOf, sendJson } from './api';

const answering = (body: string, status = 200) =>
	vi.fn(async () => new Response(body, { status, headers: { 'content-type': 'application/json' } }));
afterEach(() => vi.unstubAllGlobals());

describe('getJson', () => {
	it('gives the body', async () => {
		expect(await getJson(answering('{"a":1}'), '/api/x')).toEqual({ a: 1 });
	});
	it('throws the problem with its detail', async () => {
		const refusing = answering('{"type":"about:blank","title":"Not valid","status":422,"detail":"tag is empty"}', 422);
		await expect(getJson(refusing, '/api/x')).rejects.toThrow('tag is empty');
		await expect(getJson(refusing, '/api/x')).rejects.toBeInstanceOf(ApiError);
	});
});

describe('problemOf', () => {
	it('says the status where no problem came', async () => {
		expect((await problemOf(new Response('<html>', { status: 502 }))).title).toBe('The server answered 502');
	});
});

describe('sendJson', () => {
	it('sends JSON and takes an empty answer', async () => {
		const fetcher = vi.fn<typeof fetch>(async () => new Response(null, { status: 204 }));
		vi.stubGlobal('fetch', fetcher);
		expect(await sendJson('PATCH', '/api/x', { a: 1 })).toBeUndefined();
		expect(fetcher.mock.calls[0]?.[1]?.body).toBe('{"a":1}');
	});
});

describe('pathWith', () => {
	it('leaves out what has no value', () => {
		expect(pathWith('/api/units', { view: 'summary', site: null, from: '' })).toBe('/api/units?view=summary');
		expect(pathWith('/api/units', {})).toBe('/api/units');
	});
});
