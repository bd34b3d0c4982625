import { formatNumber } from '$lib/utils/format';
import { valueTicks } from '$lib/utils/axis-ticks';
import { placeLabels, placesAlong, placesAtLevel } from '$lib/utils/label-placement';
import { textWidth } from '$lib/utils/text-width';
import { type Extents, traceExtents } from '$lib/utils/trace-extents';
import type { PanelLabel, PanelLine, PanelTick } from './PaperPanel.svelte';

const HEIGHT = 14;

/** A rounded value axis for a panel: its domain and printed ticks. */
export function panelAxis(
	values: Iterable<number>,
	least: number,
	most = 4
): { domain: [number, number]; ticks: PanelTick[] } {
	const { low, high, ticks } = valueTicks(values, most, least);
	const whole = ticks.every((tick) => Number.isInteger(tick));
	return { domain: [low, high], ticks: ticks.map((value) => ({ value, label: formatNumber(value, whole ? 0 : 1) })) };
}

export type PanelGround = {
	/** px of the plot inside its padding */
	width: number;
	height: number;
	x: (value: number) => number;
	y: (value: number) => number;
	/** Levels no label may stand on, and their words. */
	levels: { value: number; text: string; ink: string; key: string }[];
	uprights: readonly number[];
	startX: number;
};

/** The columns of a panel a line covers. */
function lineExtents(line: PanelLine, ground: PanelGround): Extents {
	const t = line.data.map(({ x }) => x);
	const v = line.data.map(({ y }) => y ?? Number.NaN);
	const window = { from: t[0] ?? 0, to: t.at(-1) ?? 0 };
	return traceExtents({ t, v }, ground.x, ground.y, window, ground.width, line.hold);
}

/** Puts the labels of a panel's lines and levels on free paper; what finds none is left out. */
export function labelPanel(lines: readonly (PanelLine & { label?: string })[], ground: PanelGround): PanelLabel[] {
	const extents = lines.map((line) => lineExtents(line, ground));
	const wishes = lines.flatMap((line, k) => {
		const trace = extents[k];
		if (!line.label || !trace) return [];
		const size = { width: textWidth(line.label), height: HEIGHT };
		const places = placesAlong(trace, size, { width: ground.width, startX: ground.startX });
		return [{ key: line.key, ...size, places, text: line.label, ink: line.ink }];
	});
	for (const { key, value, text, ink } of ground.levels) {
		const size = { width: textWidth(text, 12, 'words', 600), height: HEIGHT };
		wishes.push({ key, ...size, places: placesAtLevel(ground.y(value), size, ground), text, ink });
	}
	const placed = placeLabels(wishes, {
		width: ground.width,
		height: ground.height,
		traces: extents,
		uprights: ground.uprights,
		levels: ground.levels.map(({ value }) => ground.y(value))
	});
	return wishes.flatMap(({ key, text, ink }) => {
		const box = placed.get(key);
		return box ? [{ key, text, ink, ...box }] : [];
	});
}
