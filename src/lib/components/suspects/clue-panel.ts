import { inkOf, traceStyle } from '$lib/components/charts/trace-style';
import { labelPanel, panelAxis } from '$lib/components/charts/panel-layout';
import type { Panel, PanelLabel, PanelLine } from '$lib/components/charts/PaperPanel.svelte';
import { printedMeasure, type StartTrace, type StartTraces } from '$lib/components/start-sheet/start-traces';
import { fromStored, MEASURES, type UnitSystem } from '$lib/model/quantities';
import type { TraceKey } from '$lib/model/signals';
import { axisClock } from '$lib/utils/axis-ticks';
import { lowerBound } from '$lib/utils/trace-path';

export type CluePanelInput = {
	signals: readonly string[];
	from: number;
	to: number;
	main: StartTraces;
	held: StartTraces | null;
	tripSeconds: number | null;
	/** °C; drawn where evaporator saturation is shown */
	cutout: number | null;
	units: UnitSystem;
	air: number;
	/** px of the plot inside its padding */
	width: number;
	height: number;
};

/** Readings of one trace in a window, thinned to the plot, as points in the printed unit of measure. */
function points(trace: StartTrace, set: StartTraces, input: CluePanelInput): PanelLine['data'] {
	const measure = printedMeasure(trace, input.units);
	const first = lowerBound(trace.t, set.startMs + input.from * 1000);
	const last = lowerBound(trace.t, set.startMs + input.to * 1000 + 1);
	const data: PanelLine['data'] = [];
	for (let i = first; i < last; i++) {
		const value = trace.v[i] ?? Number.NaN;
		const x = ((trace.t[i] ?? 0) - set.startMs) / 1000;
		// A held record keeps its value up to the next one.
		const before = data.at(-1);
		if (trace.hold && before?.y !== undefined && before.y !== null) data.push({ x, y: before.y });
		data.push({ x, y: Number.isNaN(value) ? null : fromStored(value, measure, input.air) });
	}
	return data;
}

/**
 * The small figure beside a clue: what it was read from, of one start, over a held one. One quantity an axis: signals of
 * another quantity than the first are left out.
 * @returns null when the start has none of the signals
 */
export function cluePanel(input: CluePanelInput): { panel: Panel; labels: PanelLabel[]; symbol: string } | null {
	const { main, held, units, air } = input;
	const keys = input.signals.filter((key): key is TraceKey => main.traces.has(key as TraceKey));
	const lead = keys[0] && main.traces.get(keys[0]);
	if (!lead) return null;
	const shown = keys.filter((key) => main.traces.get(key)?.quantity === lead.quantity).slice(0, 3);
	const measure = printedMeasure(lead, units);
	const lines: (PanelLine & { label?: string })[] = [];
	for (const [set, ghost] of [[held, true] as const, [main, false] as const])
		for (const key of shown) {
			const trace = set?.traces.get(key);
			if (!set || !trace || (ghost && key !== shown[0])) continue;
			const style = traceStyle(key);
			const data = points(trace, set, input);
			const ink = inkOf(style.family, ghost);
			const label = ghost ? 'held' : trace.label;
			lines.push({
				key: `${ghost ? 'held ' : ''}${key}`,
				data,
				ink,
				width: ghost ? 1.1 : style.width,
				dash: style.dash,
				hold: trace.hold,
				label
			});
		}
	const cutout =
		input.cutout !== null && shown.includes('evapSaturation') ? fromStored(input.cutout, measure, air) : null;
	const values = lines.flatMap(({ data }) => data.map(({ y }) => y ?? Number.NaN));
	const axis = panelAxis(cutout === null ? values : [...values, cutout], 4, 3);
	const [low, high] = axis.domain;
	const x = (s: number) => ((s - input.from) / (input.to - input.from)) * input.width;
	const y = (v: number) => input.height - ((v - low) / (high - low)) * input.height;
	const uprights: Panel['uprights'] = input.from <= 0 ? [{ x: 0, kind: 'start' }] : [];
	if (input.tripSeconds !== null && input.tripSeconds <= input.to)
		uprights.push({ x: input.tripSeconds, kind: 'trip' });
	const levels = cutout === null ? [] : [{ key: 'cutout', value: cutout, text: 'cut-out', ink: 'var(--trip)' }];
	const ground = {
		width: input.width,
		height: input.height,
		x,
		y,
		levels,
		uprights: uprights.map((upright) => x(upright.x)),
		startX: x(0)
	};
	const ends = [...new Set([Math.max(input.from, 0), input.to])];
	const panel: Panel = {
		xDomain: [input.from, input.to],
		yDomain: axis.domain,
		xTicks: ends.map((value) => ({ value, label: value === input.to ? `${axisClock(value)} min` : axisClock(value) })),
		yTicks: axis.ticks,
		bands: [],
		lines,
		levels: cutout === null ? [] : [{ value: cutout, kind: 'trip' }],
		uprights
	};
	return { panel, labels: labelPanel([...lines].reverse(), ground), symbol: MEASURES[measure].symbol };
}
