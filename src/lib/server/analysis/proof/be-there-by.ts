import type { StartRecord } from '$lib/model/start';
import { quantile } from '../statistics/quantile';
import { siteClock } from '../wording/site-clock';

const DAY = 86_400_000;
/** Days looked back, early quantile and margin are this product's own. */
export const BE_THERE = { days: 21, quantile: 0.1, marginMinutes: 20, least: 3 } as const;

export type WeekdayKind = 'working-day' | 'weekend';
export const weekdayKind = (weekday: number): WeekdayKind =>
	weekday === 0 || weekday === 6 ? 'weekend' : 'working-day';

/**
 * When to be there to see the first start of the day: the 10th percentile of the unattended first-start clocks of the
 * same weekday kind over 21 days, less 20 min.
 * @returns minutes of the site's day by weekday kind; null with fewer than three first starts of that kind
 */
export function beThereBy(
	starts: readonly StartRecord[],
	timeZone: string,
	now: number
): Record<WeekdayKind, { minutes: number; firstStarts: number } | null> {
	const clocks: Record<WeekdayKind, number[]> = { 'working-day': [], weekend: [] };
	for (const start of starts) {
		if (!start.firstStart || start.attended || start.startedAt > now || start.startedAt < now - BE_THERE.days * DAY)
			continue;
		const clock = siteClock(start.startedAt, timeZone);
		clocks[weekdayKind(clock.weekday)].push(clock.minutes);
	}
	const early = (values: number[]) => {
		const minutes = values.length < BE_THERE.least ? null : quantile(values, BE_THERE.quantile);
		return minutes === null
			? null
			: { minutes: Math.max(0, Math.floor(minutes - BE_THERE.marginMinutes)), firstStarts: values.length };
	};
	return { 'working-day': early(clocks['working-day']), weekend: early(clocks.weekend) };
}
