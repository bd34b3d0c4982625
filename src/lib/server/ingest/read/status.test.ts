import { expect, it } from 'vitest';
import { isGoodStatus } from './status';

// Project Haystack's status words: ok, stale, fault, down, disabled, unknown.
it('takes the standard’s words', () => {
	expect(['ok', '', '{ok}', 'Good'].every(isGoodStatus)).toBe(true);
	expect(['stale', 'fault', 'down', 'disabled', 'unknown', '{fault}'].some(isGoodStatus)).toBe(false);
});
