import { HOME_WINDOW, type TimeWindow } from './paper-scale';

/** Closest zoom: ten seconds of paper (ours). */
export const CLOSEST = 10;

/** Moves a window inside the bounds without changing its length where that fits. */
function held(window: TimeWindow, bounds: TimeWindow): TimeWindow {
	const length = Math.min(window.to - window.from, bounds.to - bounds.from);
	const from = Math.min(Math.max(window.from, bounds.from), bounds.to - length);
	return { from, to: from + length };
}

/**
 * Zooms about an instant, which stays under the pointer.
 * @param factor above 1 shows less time, below 1 more
 * @param bounds the most there is to show
 */
export function zoomAbout(window: TimeWindow, factor: number, anchor: number, bounds: TimeWindow): TimeWindow {
	const length = window.to - window.from;
	const next = Math.min(Math.max(length / factor, CLOSEST), bounds.to - bounds.from);
	const share = Math.min(1, Math.max(0, (anchor - window.from) / length));
	const from = anchor - share * next;
	return held({ from, to: from + next }, bounds);
}

/** Moves a window by seconds, not past the bounds. */
export function panBy(window: TimeWindow, seconds: number, bounds: TimeWindow): TimeWindow {
	return held({ from: window.from + seconds, to: window.to + seconds }, bounds);
}

/** A dragged stretch as a window: ends in order, at least the closest zoom, inside the bounds. */
export function dragWindow(a: number, b: number, bounds: TimeWindow): TimeWindow {
	const from = Math.min(a, b);
	const to = Math.max(a, b);
	const lack = Math.max(0, CLOSEST - (to - from)) / 2;
	return held({ from: from - lack, to: to + lack }, bounds);
}

/** What zooming starts from when the paper still runs at two speeds: the fast part, where the eye is. */
export const FAST_WINDOW: TimeWindow = { from: HOME_WINDOW.from, to: 240 };
