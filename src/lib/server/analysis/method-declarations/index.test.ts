import { describe, expect, it } from 'vitest';
import { FIGURE_KEYS } from '$lib/model/start';
import { METHOD_SECTIONS, readingOf } from './index';

describe('the declared method', () => {
	const entries = METHOD_SECTIONS.flatMap((section) => section.entries);
	it('names a source wherever it claims one, and claims none where it has none', () => {
		for (const entry of entries) expect(Boolean(entry.source), entry.name).toBe(entry.origin === 'source');
	});
	it('says how every figure is read', () => {
		for (const key of FIGURE_KEYS) expect(readingOf(key).length, key).toBeGreaterThan(4);
	});
	it('has each section and each statement once', () => {
		expect(new Set(METHOD_SECTIONS.map((section) => section.key)).size).toBe(METHOD_SECTIONS.length);
		for (const section of METHOD_SECTIONS) {
			const names = section.entries.map((entry) => entry.name);
			expect(new Set(names).size, section.key).toBe(names.length);
		}
	});
	it('claims no maker’s number', () => expect(entries.some((entry) => entry.origin === 'maker')).toBe(false));
});
