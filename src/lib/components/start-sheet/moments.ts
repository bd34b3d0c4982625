import type { FirstMover } from '$lib/model/wire/start-sheet';
import { axisClock } from '$lib/utils/axis-ticks';
import { type Box, placeLabels } from '$lib/utils/label-placement';
import { textWidth } from '$lib/utils/text-width';

export type MomentLayout = {
	ticks: { seconds: number; x: number; label: string }[];
	crosses: { signal: string; x: number; from: number; to: number }[];
	tripX: number | null;
	labels: (Box & { key: string; text: string })[];
};

const LINE = 24;
const HEIGHT = 14;

/**
 * A line of seconds, px: an interval for each departure (its time ± error), a bar for the trip, and a label for each that
 * finds room above or below; the earliest are placed first.
 */
export function layOutMoments(mover: FirstMover, width: number): MomentLayout {
	const last = Math.max(
		...mover.departures.map(({ atSeconds, errorSeconds }) => atSeconds + errorSeconds),
		mover.tripAtSeconds ?? 0,
		30
	);
	const end = last * 1.06;
	const x = (seconds: number) => Math.round(Math.min(Math.max(seconds / end, 0), 1) * (width - 1) * 10) / 10 + 0.5;
	const step = [5, 10, 15, 30, 60, 120, 300, 600].find((s) => (s / end) * width >= 48) ?? 1200;
	const count = Math.floor(end / step);
	const ticks = Array.from({ length: count + 1 }, (_, k) => k * step).map((seconds) => ({
		seconds,
		x: x(seconds),
		label: step < 60 ? String(seconds) : axisClock(seconds)
	}));
	const tripX = mover.tripAtSeconds === null ? null : x(mover.tripAtSeconds);
	const crosses = mover.departures.map(({ signal, atSeconds, errorSeconds }) => ({
		signal,
		x: x(atSeconds),
		from: x(atSeconds - errorSeconds),
		to: x(atSeconds + errorSeconds)
	}));
	const wish = (key: string, text: string, at: number) => {
		const size = { width: textWidth(text), height: HEIGHT };
		const xs = [at - 4, at - size.width / 2, at + 4 - size.width].map((left) =>
			Math.min(Math.max(left, 2), width - size.width - 2)
		);
		const ys = [LINE - 7 - HEIGHT, LINE + 5];
		return { key, ...size, text, places: ys.flatMap((y) => xs.map((left) => ({ x: left, y }))) };
	};
	const wishes = mover.departures.map(({ signal, label, atSeconds }) =>
		wish(signal, `${label} ${Math.round(atSeconds)}`, x(atSeconds))
	);
	if (tripX !== null && mover.tripAtSeconds !== null)
		wishes.unshift(wish('trip', `trip ${Math.round(mover.tripAtSeconds)} s`, tripX));
	const placed = placeLabels(wishes, { width, height: 46, traces: [], uprights: [] });
	const labels = wishes.flatMap(({ key, text }) => {
		const box = placed.get(key);
		return box ? [{ key, text, ...box }] : [];
	});
	// A tick's figure gives way to a label below the line.
	const free = (tick: { x: number; label: string }) =>
		!labels.some((box) => box.y > LINE && tick.x > box.x - 14 && tick.x < box.x + box.width + 14);
	return { ticks: ticks.map((tick) => (free(tick) ? tick : { ...tick, label: '' })), crosses, tripX, labels };
}
