import { type PaperScale, toPixel } from './paper-scale';

export type TimeTick = { seconds: number; x: number; /** Empty on a minor tick. */ label: string };
export type ValueTicks = { low: number; high: number; ticks: number[]; step: number };

const STEPS = [1, 2, 5, 10, 15, 30, 60, 120, 300, 600, 900, 1800, 3600, 7200, 14400];

/** Elapsed seconds as an axis prints them: whole minutes ("4", "−1"), or "2:30" and "−0:30" between. */
export function axisClock(seconds: number): string {
	const s = Math.round(Math.abs(seconds));
	const sign = seconds < 0 && s > 0 ? '−' : '';
	const rest = s % 60;
	return `${sign}${Math.floor(s / 60)}${rest === 0 ? '' : `:${String(rest).padStart(2, '0')}`}`;
}

/** Ticks of one stretch of paper, at least `room` px apart, minor ones where half a step keeps 12 px. */
function stretchTicks(scale: PaperScale, from: number, to: number, room: number): TimeTick[] {
	const pixels = toPixel(scale, to - 1e-6) - toPixel(scale, from);
	const perPixel = (to - from) / pixels;
	const step = STEPS.find((s) => s / perPixel >= room) ?? 14400;
	const divide = [5, 4, 2].find((n) => Number.isInteger(step / n) && step / n / perPixel >= 12) ?? 1;
	const minor = step / divide;
	const ticks: TimeTick[] = [];
	for (let k = Math.ceil(from / minor - 1e-9); k * minor <= to + 1e-9; k++) {
		const seconds = k * minor;
		ticks.push({ seconds, x: toPixel(scale, seconds), label: seconds % step === 0 ? axisClock(seconds) : '' });
	}
	return ticks;
}

/**
 * Ticks of the time axis, px and printed label; each paper speed has its own step, and the break itself is printed once.
 * @param room least px between two labels
 */
export function timeTicks(scale: PaperScale, room = 56): TimeTick[] {
	if (scale.breakAt === null) return stretchTicks(scale, scale.from, scale.to, room);
	const fast = stretchTicks(scale, scale.from, scale.breakAt, room);
	const slow = stretchTicks(scale, scale.breakAt + 1e-3, scale.to, room);
	// A slow label right after the break would run into the break's own.
	const clear = scale.slowBegin + room / 2;
	return [...fast, ...slow.map((tick) => (tick.x < clear ? { ...tick, label: '' } : tick))];
}

/**
 * A rounded value axis: whole steps of 1, 2 or 5 · 10ⁿ, `most` ticks at most, wide enough for every value given.
 * Values that are not finite count for nothing; none at all gives 0 to 1.
 * @param least the smallest span worth drawing, so that noise is not blown up to fill the strip
 */
export function valueTicks(values: Iterable<number>, most = 4, least = 1): ValueTicks {
	let low = Infinity;
	let high = -Infinity;
	for (const v of values) {
		if (!Number.isFinite(v)) continue;
		if (v < low) low = v;
		if (v > high) high = v;
	}
	if (low > high) [low, high] = [0, 1];
	const lack = least - (high - low);
	if (lack > 0) [low, high] = [low - lack / 2, high + lack / 2];
	// One value and no least span has no width to divide: it stands in the middle of a span of its own size.
	if (!(high - low > 1e-9 * Math.max(Math.abs(low), Math.abs(high)))) {
		const half = Math.max(Math.abs(high) / 2, 0.5);
		[low, high] = [low - half, high + half];
	}
	const pad = (high - low) * 0.06;
	const [bottom, top] = [low - pad, high + pad];
	const count = (step: number) => Math.floor(top / step + 1e-9) - Math.ceil(bottom / step - 1e-9) + 1;
	let power = 10 ** Math.floor(Math.log10((top - bottom) / most));
	let step = 0;
	// The finest round step that keeps within the ticks allowed.
	for (; step === 0; power *= 10) step = [1, 2, 5].map((n) => n * power).find((n) => count(n) <= most) ?? 0;
	const ticks: number[] = [];
	for (let k = Math.ceil(bottom / step - 1e-9); k * step <= top + 1e-9 && ticks.length < most; k++)
		ticks.push(Number((k * step).toPrecision(12)));
	return { low: bottom, high: top, ticks, step };
}
