import { expect, it } from 'vitest';
import { DAY, MINUTE, MONDAY } from '../../../../../fixtures/inference/start-record';
import { daysCovered } from './coverage';
import { parseGroup } from './group-grammar';

const period = { from: MONDAY, to: MONDAY + 5 * DAY };

it('counts mornings by the hours the group can start in (by hand)', () => {
	const covered = [
		{ from: MONDAY, to: MONDAY + DAY },
		{ from: MONDAY + DAY + 300 * MINUTE, to: MONDAY + DAY + 700 * MINUTE },
		// Only an afternoon: no morning.
		{ from: MONDAY + 2 * DAY + 780 * MINUTE, to: MONDAY + 2 * DAY + 1200 * MINUTE }
	];
	expect(daysCovered(covered, period, parseGroup('first&clock<11:00'), 'UTC')).toEqual({
		covered: 2,
		days: 5,
		what: 'mornings'
	});
	expect(daysCovered(covered, period, parseGroup('clock>=12:00'), 'UTC')).toMatchObject({
		covered: 2,
		what: 'afternoons'
	});
	expect(daysCovered([], period, parseGroup('all'), 'UTC')).toEqual({ covered: 0, days: 5, what: 'days' });
});
