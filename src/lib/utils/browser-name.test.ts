import { expect, it } from 'vitest';
import { browserName } from './browser-name';

// Texts in the form browsers send, put together for this test.
it('names browser and machine, whatever others the text claims to be', () => {
	const like = 'AppleWebKit/537.36 (KHTML, like Gecko)';
	expect(browserName(`Mozilla/5.0 (X11; Linux x86_64) ${like} Chrome/140.0.0.0 Safari/537.36`)).toBe(
		'Chromium or Chrome on Linux'
	);
	expect(browserName(`Mozilla/5.0 (Windows NT 10.0) ${like} Chrome/140.0.0.0 Safari/537.36 Edg/140.0`)).toBe(
		'Edge on Windows'
	);
	expect(browserName('Mozilla/5.0 (Android 14; Mobile; rv:140.0) Gecko/140.0 Firefox/140.0')).toBe(
		'Firefox on Android'
	);
	expect(browserName(`Mozilla/5.0 (iPhone; CPU iPhone OS 18_0 like Mac OS X) ${like} Version/18.0 Safari/604.1`)).toBe(
		'Safari on iPhone or iPad'
	);
});

it('gives a program its own words, and no more than fit', () => {
	expect(browserName(null)).toBe('A program');
	expect(browserName('gateway/2')).toBe('gateway/2');
	expect(browserName('x'.repeat(500))).toHaveLength(60);
});
