import type { SignalKey } from '$lib/model/signals';
import { SIGNALS } from '$lib/model/signals';
import type { Log } from '$lib/model/wire/log';
import { formatDuration } from '$lib/utils/clock';

/** What a log can and cannot tell, and what to change in the controller's logging to be able to tell more. */

/** Figures after the start-up bypass need readings this close: method.md, "Figures of a start". */
const CLOSE_SECONDS = 15;
/** An inferred trip needs rows this close: method.md, "Starts and outcomes". */
const INFER_SECONDS = 60;

/** What tells a tripped start from a held one; any of a group does. */
const TELLING: readonly (readonly SignalKey[])[] = [
	['running'],
	['capacity', 'speed'],
	['demand'],
	['evapSaturation', 'evapPressure'],
	['condSaturation', 'condPressure'],
	['evapWaterOut'],
	['condWaterIn', 'condAirIn'],
	['oilTemp'],
	['valvePosition'],
	['motorCurrent', 'power'],
	['alarm']
];

/** The shortest event that the log's spacing can show, as words. */
export function smallestEvent(log: Pick<Log, 'layout'>): string {
	const seconds = log.layout?.intervalSeconds ?? null;
	return seconds === null ? 'cannot be told: rows come unevenly' : `${formatDuration(seconds)}, one row`;
}

/** What to change in the controller's logging; empty when nothing would tell more. */
export function loggingAdvice(log: Pick<Log, 'layout' | 'mapping'>): string[] {
	const known = new Set(log.mapping.map((entry) => entry.signal));
	// A log of nothing but alarms is no trend log with signals missing.
	if (known.size === 0) return [];
	const missing = TELLING.filter((group) => !group.some((key) => known.has(key))).map((group) => group[0]);
	const advice: string[] = [];
	const seconds = log.layout?.intervalSeconds ?? null;
	if (seconds === null || seconds > CLOSE_SECONDS) {
		const more =
			seconds !== null && seconds > INFER_SECONDS ? ' A trip without an alarm cannot be told from a stop.' : '';
		advice.push(
			`Log every 5 s from a start until 15 min after it; what is shorter than ${seconds === null ? 'a gap between rows' : formatDuration(seconds)} does not show.${more}`
		);
	}
	if (missing.length > 0) {
		const names = missing.flatMap((key) => (key ? [SIGNALS[key].label] : []));
		advice.push(`Log also ${names.join(', ')}.`);
	}
	return advice;
}

/** Stretches as x and width in px of a strip, of a window in ms; slivers are widened so that they show. */
export function stripOf(
	covered: readonly { from: number; to: number }[],
	window: { from: number; to: number },
	width: number
): { x: number; width: number }[] {
	const span = Math.max(1, window.to - window.from);
	return covered.map(({ from, to }) => {
		const x = Math.max(0, ((from - window.from) / span) * width);
		return { x, width: Math.max(1, Math.min(width - x, ((to - from) / span) * width)) };
	});
}

/** Share of a window that stretches cover, 0…1. */
export function shareOf(
	covered: readonly { from: number; to: number }[],
	window: { from: number; to: number }
): number {
	const span = window.to - window.from;
	if (span <= 0) return covered.length > 0 ? 1 : 0;
	return Math.min(1, covered.reduce((sum, { from, to }) => sum + (to - from), 0) / span);
}
