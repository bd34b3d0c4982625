import type { Interval } from '$lib/model/series';
import { siteClock } from '../wording/site-clock';
import type { GroupExpression } from './group-grammar';

/** The stretch of the day that a group's clock terms leave, minutes of the site's day. */
function windowOf(expression: GroupExpression): { from: number; to: number } {
	const window = { from: 0, to: 1440 };
	for (const term of expression.terms) {
		if (term.kind !== 'clock' || term.not) continue;
		if (term.compare.startsWith('<')) window.to = Math.min(window.to, term.minutes);
		if (term.compare.startsWith('>')) window.from = Math.max(window.from, term.minutes);
	}
	return window;
}

const STEP = 15 * 60_000;

/**
 * On how many of the period's days the log covers at least half of the group's stretch of the clock. Nights of a
 * comparison without clock terms count from 04:00 to 20:00, when units start.
 */
export function daysCovered(
	covered: readonly Interval[],
	period: Interval,
	expression: GroupExpression,
	timeZone: string
): { covered: number; days: number; what: string } {
	const window = windowOf(expression);
	const whole = window.from === 0 && window.to === 1440;
	const [from, to] = whole
		? [240, 1200]
		: [Math.max(window.from, window.to <= 720 ? 240 : 0), Math.min(window.to, 1200)];
	const days = new Map<string, { seen: number; all: number }>();
	for (let at = period.from; at < period.to; at += STEP) {
		const clock = siteClock(at, timeZone);
		if (clock.minutes < from || clock.minutes >= to) continue;
		const day = days.get(clock.date) ?? { seen: 0, all: 0 };
		day.all++;
		if (covered.some((one) => at >= one.from && at <= one.to)) day.seen++;
		days.set(clock.date, day);
	}
	const counted = [...days.values()].filter((day) => day.all > 0);
	const what = whole ? 'days' : window.to <= 720 ? 'mornings' : window.from >= 720 ? 'afternoons' : 'days';
	return { covered: counted.filter((day) => day.seen >= 0.5 * day.all).length, days: counted.length, what };
}
