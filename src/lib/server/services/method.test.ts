import { describe, expect, it } from 'vitest';
import { SUSPECT_KEYS } from '$lib/model/suspect';
import { methodSchema } from '$lib/model/wire/method';
import { describeMethod } from './method';

describe('describeMethod', () => {
	const method = describeMethod();
	it('answers in its declared shape', () => expect(methodSchema.safeParse(method).success).toBe(true));
	it('holds every suspect with a check that decides and a clue that speaks for it', () => {
		expect(method.suspects.map((suspect) => suspect.key).sort()).toEqual([...SUSPECT_KEYS].sort());
		for (const suspect of method.suspects) {
			expect(suspect.check.length, suspect.key).toBeGreaterThan(5);
			expect(
				suspect.clues.some((clue) => clue.direction === 'for'),
				suspect.key
			).toBe(true);
		}
	});
	it('quotes a whole evaluation: 300 sound units or more, every fault', () => {
		const all = method.accuracy.groups.find((group) => group.key === 'all');
		expect(all?.soundLogs).toBeGreaterThanOrEqual(300);
		expect(method.accuracy.families.length).toBeGreaterThan(20);
	});
	it('carries the cautions', () => expect(method.cautions.join(' ')).toContain('never bypass'));
});
