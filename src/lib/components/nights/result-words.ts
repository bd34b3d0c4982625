import type { RestTest } from '$lib/model/wire/nights';

/** What the result of a rest test is called. */
export const RESULT_WORDS: Readonly<Record<RestTest['result'], string>> = {
	passed: 'passed',
	failed: 'failed',
	shown: 'shown, no verdict',
	'not-testable': 'not testable'
};
