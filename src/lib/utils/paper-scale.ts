/** A stretch of elapsed time, seconds from the start. */
export type TimeWindow = { from: number; to: number };

/**
 * Elapsed time to pixels. A strip of paper runs at one speed, or fast up to `breakAt` and slow after it, with
 * `gap` pixels of bare frame between the two.
 */
export type PaperScale = TimeWindow & {
	width: number;
	/** Seconds at which the paper slows; null on one-speed paper. */
	breakAt: number | null;
	/** Right edge of the fast paper and left edge of the slow one, px; both `width` on one-speed paper. */
	fastEnd: number;
	slowBegin: number;
	/** How many times slower the second part runs (printed "1 : 14"); 1 on one-speed paper. */
	ratio: number;
};

/** The sheet's first view: 1 min before the start to 4 min after it fast, then slow to 40 min (ours). */
export const HOME_WINDOW: TimeWindow = { from: -60, to: 2400 };
const HOME_BREAK = 240;
const FAST_SHARE = 0.66;

/**
 * Two-speed paper: `window.from` to `breakAt` takes 66 % of the width, the rest what is left after the gap.
 * @param width px of the plot
 * @param window seconds; must hold `breakAt` inside
 * @throws RangeError when the width is not above the gap or the break lies outside the window
 */
export function twoSpeedScale(width: number, window = HOME_WINDOW, breakAt = HOME_BREAK, gap = 4): PaperScale {
	if (!(width > gap)) throw new RangeError(`a plot ${width} px wide has no room for two paper speeds`);
	if (!(window.from < breakAt && breakAt < window.to))
		throw new RangeError(`the paper cannot slow at ${breakAt} s outside ${window.from} to ${window.to} s`);
	const fastEnd = Math.round((width - gap) * FAST_SHARE);
	const slowBegin = fastEnd + gap;
	const fast = (breakAt - window.from) / fastEnd;
	const slow = (window.to - breakAt) / (width - slowBegin);
	return { ...window, width, breakAt, fastEnd, slowBegin, ratio: slow / fast };
}

/**
 * One-speed paper over a window.
 * @throws RangeError when the window or the width is empty
 */
export function oneSpeedScale(width: number, window: TimeWindow): PaperScale {
	if (!(width > 0)) throw new RangeError(`a plot ${width} px wide cannot be drawn on`);
	if (!(window.from < window.to)) throw new RangeError(`the window ${window.from} to ${window.to} s is empty`);
	return { ...window, width, breakAt: null, fastEnd: width, slowBegin: width, ratio: 1 };
}

/** Pixel of an elapsed time; outside the window the nearest part's speed carries on. */
export function toPixel(scale: PaperScale, seconds: number): number {
	const { from, to, width, breakAt, fastEnd, slowBegin } = scale;
	if (breakAt === null) return ((seconds - from) / (to - from)) * width;
	if (seconds <= breakAt) return ((seconds - from) / (breakAt - from)) * fastEnd;
	return slowBegin + ((seconds - breakAt) / (to - breakAt)) * (width - slowBegin);
}

/** Elapsed time at a pixel; the bare frame between two speeds reads as the break. */
export function toSeconds(scale: PaperScale, px: number): number {
	const { from, to, width, breakAt, fastEnd, slowBegin } = scale;
	if (breakAt === null) return from + (px / width) * (to - from);
	if (px <= fastEnd) return from + (px / fastEnd) * (breakAt - from);
	if (px < slowBegin) return breakAt;
	return breakAt + ((px - slowBegin) / (width - slowBegin)) * (to - breakAt);
}
