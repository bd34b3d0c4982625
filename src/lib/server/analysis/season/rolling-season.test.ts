import { expect, it } from 'vitest';
import { DAY, MONDAY, startRecord } from '../../../../../fixtures/inference/start-record';
import { rollingSeason } from './rolling-season';
import { weekOf } from './week';

/** Thirteen weeks of five runs each (invented). */
const season = (value: (week: number) => number, capacity: (run: number) => number = () => 90) =>
	Array.from({ length: 65 }, (_, run) => {
		const week = Math.floor(run / 5);
		return startRecord(MONDAY + (7 * week + (run % 5)) * DAY, {
			figures: { condApproach: value(week) + (run % 5) / 100, settledCapacity: capacity(run) }
		});
	});

it('finds the week of a new level (by hand: week 7 begins on 2025-07-21)', () => {
	const [trace] = rollingSeason(
		season((week) => (week < 7 ? 2 : 3.5)),
		'UTC'
	);
	expect(trace?.key).toBe('condApproach');
	expect(trace?.weeks).toHaveLength(13);
	expect(trace?.change).toEqual({ week: '2025-07-21', before: 2.02, after: 3.52 });
});

it('finds a slow drift and nothing in a level season', () => {
	expect(
		rollingSeason(
			season((week) => 2 + week * 0.1),
			'UTC'
		)[0]?.driftPerWeek
	).toBeCloseTo(0.1, 9);
	const level = rollingSeason(
		season((week) => 2 + (week % 2) * 0.05),
		'UTC'
	)[0];
	expect(level?.change).toBeNull();
	expect(level?.driftPerWeek).toBeNull();
});

it('compares like load only, and weeks with two runs at least', () => {
	const traces = rollingSeason(
		season(
			() => 2,
			(run) => (run % 5 === 0 ? 40 : 90)
		),
		'UTC'
	);
	expect(traces[0]?.weeks[0]?.count).toBe(4);
	expect(rollingSeason(season(() => 2).slice(0, 1), 'UTC')).toEqual([]);
});

it('follows resting offsets beside the figures', () => {
	const offsets = Array.from({ length: 14 }, (_, day) => ({
		key: 'saturation-leaving-offset',
		label: 'saturation against leaving water',
		at: MONDAY + day * DAY,
		value: -0.4
	}));
	expect(rollingSeason([], 'UTC', offsets)[0]?.weeks.map((one) => one.value)).toEqual([-0.4, -0.4]);
});

it("begins a week on the site's Monday", () => {
	expect(weekOf(Date.parse('2025-06-09T03:00:00Z'), 'America/New_York')).toBe('2025-06-02');
	expect(weekOf(Date.parse('2025-06-09T05:00:00Z'), 'America/New_York')).toBe('2025-06-09');
});
