/** A stretch of a day's clock, minutes from midnight. */
export type ClockSpan = { from: number; to: number };

/**
 * Minutes of a day to pixels. Even paper runs at one speed; wide paper gives one span half the width and lets the
 * rest of the day share the other half, with `gap` px of bare frame where the speed changes.
 */
export type DayClock = {
	width: number;
	/** First and last minute drawn; 1500 at most (the day the clocks go back has 25 hours). */
	begin: number;
	end: number;
	wide: ClockSpan | null;
	/** px of the wide span. */
	wideLeft: number;
	wideRight: number;
	gap: number;
};

/**
 * Even paper from `begin` to `end`.
 * @throws RangeError when the width or the span is empty
 */
export function evenClock(width: number, end = 1440, begin = 0): DayClock {
	demand(width, begin, end);
	return { width, begin, end, wide: null, wideLeft: 0, wideRight: width, gap: 0 };
}

/**
 * Paper that runs wide through `wide` (half the width) and narrow before and after it, each in proportion.
 * @throws RangeError when the width or a span is empty, or the wide span is not inside the day
 */
export function wideClock(width: number, wide: ClockSpan, end = 1440, begin = 0, gap = 4): DayClock {
	demand(width, begin, end);
	if (!(wide.from >= begin && wide.to <= end && wide.from < wide.to))
		throw new RangeError(`${wide.from} to ${wide.to} min is not inside the day`);
	const narrow = end - begin - (wide.to - wide.from);
	if (narrow <= 0) return evenClock(width, end, begin);
	const gaps = (wide.from > begin ? gap : 0) + (wide.to < end ? gap : 0);
	const half = (width - gaps) / 2;
	const before = ((wide.from - begin) / narrow) * half;
	const wideLeft = Math.round(before + (wide.from > begin ? gap : 0));
	return { width, begin, end, wide, wideLeft, wideRight: Math.round(wideLeft + half), gap };
}

function demand(width: number, begin: number, end: number): void {
	if (!(width > 0)) throw new RangeError(`paper ${width} px wide cannot be drawn on`);
	if (!(begin < end)) throw new RangeError(`a day from ${begin} to ${end} min is empty`);
}

/** Pixel of a minute of the day; minutes outside are drawn at the nearer edge. */
export function clockX(clock: DayClock, minute: number): number {
	const at = Math.min(Math.max(minute, clock.begin), clock.end);
	const { wide, wideLeft, wideRight, width, begin, end, gap } = clock;
	if (wide === null) return ((at - begin) / (end - begin)) * width;
	if (at < wide.from) return ((at - begin) / (wide.from - begin)) * (wideLeft - gap);
	if (at <= wide.to) return wideLeft + ((at - wide.from) / (wide.to - wide.from)) * (wideRight - wideLeft);
	const left = wideRight + gap;
	return left + ((at - wide.to) / (end - wide.to)) * (width - left);
}

/** Minute of the day at a pixel: the reverse of {@link clockX}; bare frame reads as the minute of its edge. */
export function clockMinute(clock: DayClock, x: number): number {
	const { wide, wideLeft, wideRight, width, begin, end, gap } = clock;
	const px = Math.min(Math.max(x, 0), width);
	if (wide === null) return begin + (px / width) * (end - begin);
	if (px < wideLeft - gap) return begin + (px / (wideLeft - gap)) * (wide.from - begin);
	if (px < wideLeft) return wide.from;
	if (px <= wideRight) return wide.from + ((px - wideLeft) / (wideRight - wideLeft)) * (wide.to - wide.from);
	if (px < wideRight + gap) return wide.to;
	return wide.to + ((px - wideRight - gap) / (width - wideRight - gap)) * (end - wide.to);
}

export type ClockTick = { minute: number; x: number; label: string; main: boolean };

/** Lines and labels of a day's clock: hours on even paper, quarters of an hour inside the wide span. */
export function clockTicks(clock: DayClock): ClockTick[] {
	const { wide, begin, end, width } = clock;
	const ticks: ClockTick[] = [];
	const add = (minute: number, label: string, main: boolean) =>
		ticks.push({ minute, x: clockX(clock, minute), label, main });
	const hours = width < 400 ? 6 : wide === null && width > 560 ? 2 : 3;
	const span = wide ?? { from: -1, to: -1 };
	for (let minute = Math.ceil(begin / 60) * 60; minute <= end; minute += 60) {
		if (minute >= span.from && minute <= span.to) continue;
		const hour = minute / 60;
		// A label close to the wide span would run into its own.
		const room = wide === null || minute < span.from - 90 || minute > span.to + 60;
		add(minute, hour % hours === 0 && room ? String(hour).padStart(2, '0') : '', hour % 6 === 0);
	}
	if (wide !== null) {
		// Labels are some 40 px wide.
		const perMinute = (clock.wideRight - clock.wideLeft) / (wide.to - wide.from);
		const step = [15, 30, 60].find((minutes) => minutes * perMinute >= 52) ?? 120;
		for (let minute = Math.ceil(wide.from / 5) * 5; minute < wide.to; minute += 5) {
			const labelled = minute % step === 0 && wide.to - minute > step / 2;
			add(minute, labelled ? clockLabel(minute) : '', labelled);
		}
	}
	return ticks.sort((a, b) => a.minute - b.minute);
}

/** Minutes of a day as a clock label. */
const clockLabel = (minute: number) =>
	`${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;
