import { describe, expect, it } from 'vitest';
import { isForeign } from './foreign';

// Invented addresses.
const HERE = 'https://firstpull.test';
const ask = (method: string, path: string, headers: Record<string, string>): boolean =>
	isForeign({ method, headers: new Headers(headers) }, new URL(path, HERE));
const FORM = { 'content-type': 'application/x-www-form-urlencoded' };

describe('isForeign', () => {
	it('refuses a form that another site’s page sends, to any address, with any unsafe method', () => {
		for (const path of ['/sign-in', '/sign-out', '/reset?/reset', '/api/units', '/account/address'])
			for (const method of ['POST', 'PUT', 'PATCH', 'DELETE'])
				expect(ask(method, path, { ...FORM, origin: 'https://else.test' }), `${method} ${path}`).toBe(true);
	});
	it('refuses an origin that hides, is a part of ours, or has another scheme or port', () => {
		for (const origin of ['null', 'https://firstpull.test.else.test', 'http://firstpull.test', `${HERE}:8443`, ''])
			expect(ask('POST', '/sign-out', { ...FORM, origin }), origin).toBe(true);
	});
	it('refuses every kind of form without an origin', () => {
		for (const type of [FORM['content-type'], 'multipart/form-data; boundary=x', 'text/plain', ' Text/Plain;charset=a'])
			expect(ask('POST', '/sign-out', { 'content-type': type }), type).toBe(true);
	});
	it('refuses JSON and bare requests that a browser marks as coming from elsewhere', () => {
		expect(ask('POST', '/api/units', { 'content-type': 'application/json', 'sec-fetch-site': 'cross-site' })).toBe(
			true
		);
		expect(ask('DELETE', '/api/units/u', { 'sec-fetch-site': 'same-site' })).toBe(true);
		expect(ask('POST', '/api/units', { 'content-type': 'application/json', origin: 'https://else.test' })).toBe(true);
	});
	it('lets our own pages, reading, and programs with a key through', () => {
		expect(ask('POST', '/sign-in', { ...FORM, origin: HERE })).toBe(false);
		expect(ask('PATCH', '/api/me', { 'content-type': 'application/json', 'sec-fetch-site': 'same-origin' })).toBe(
			false
		);
		expect(ask('GET', '/units', { origin: 'https://else.test' })).toBe(false);
		expect(
			ask('POST', '/api/units/u/logs', {
				'content-type': 'multipart/form-data; boundary=x',
				authorization: 'Bearer fp_x'
			})
		).toBe(false);
	});
	it('lets a mail program’s one click through, and nothing beside it', () => {
		expect(ask('POST', '/unsubscribe?token=x', FORM)).toBe(false);
		expect(ask('POST', '/unsubscribe/else', FORM)).toBe(true);
		expect(ask('DELETE', '/unsubscribe', FORM)).toBe(true);
	});
});
