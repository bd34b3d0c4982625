import { describe, expect, it } from 'vitest';
import { printWeek, seasonPanel, seasonWords, type SeasonTrace } from './season-panel';

/** Invented: an approach that rises by half a degree a week, the third week missing. */
const rising: SeasonTrace = {
	key: 'condApproach',
	label: 'Cond. approach, settled',
	quantity: 'temperatureDifference',
	weeks: ['2026-01-05', '2026-01-12', '2026-01-26', '2026-02-02', '2026-02-09', '2026-02-16'].map((week, k) => ({
		week,
		value: 5 + k / 2,
		count: 7
	})),
	change: null,
	driftPerWeek: 0.5
};

describe('the season panel', () => {
	it('draws every week as a point and does not bridge a missing one', () => {
		const panel = seasonPanel(rising);
		expect(panel.points).toHaveLength(6);
		expect(panel.lines[0]?.data.filter(({ y }) => y === null)).toHaveLength(1);
	});
	it('prints at most as many weeks as there is room for', () => {
		expect(seasonPanel(rising, 3).xTicks.map(({ label }) => label)).toEqual(['5 Jan', '26 Jan', '9 Feb']);
	});
	it('marks the week of a new level between it and the week before', () => {
		const changed = { ...rising, change: { week: '2026-02-02', before: 5, after: 7 } };
		expect(seasonPanel(changed).uprights).toEqual([
			{ x: Date.parse('2026-02-02') - 3.5 * 86_400_000, kind: 'landmark' }
		]);
	});
	it('says what the season did', () => {
		expect(seasonWords(rising, 'K')).toBe('rises: +2.5 K in 6 weeks');
		expect(seasonWords({ ...rising, driftPerWeek: null }, 'K')).toBe('level');
		expect(seasonWords({ ...rising, driftPerWeek: null, weeks: rising.weeks.slice(0, 3) }, 'K')).toMatch(/too few/);
	});
	it('prints a week by its Monday', () => expect(printWeek('2026-02-09')).toBe('9 Feb'));
});
