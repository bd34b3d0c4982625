import { labelPanel, panelAxis } from '$lib/components/charts/panel-layout';
import type { Panel, PanelBand, PanelLabel, PanelLine } from '$lib/components/charts/PaperPanel.svelte';
import { GHOST_WIDTH, inkOf, traceStyle } from '$lib/components/charts/trace-style';
import { DERIVED, isSignalKey, type TraceKey } from '$lib/model/signals';
import type { Comparison, Envelope } from '$lib/model/wire/comparison';

/** Landmarks that groups are read at, seconds from the start (method.md). */
export const LANDMARKS = [30, 45, 60, 90, 120] as const;

/** The least span worth drawing, so that a steady signal is not blown up: by quantity, in printed units. */
const LEAST: Readonly<Record<string, number>> = { percent: 20, current: 20, pressure: 10, flow: 10 };

type Side = Envelope['a'];

function sideLine(side: Side, key: 'A' | 'B', signal: TraceKey, until: number): PanelLine & { label: string } {
	const style = traceStyle(signal);
	const data = side.t.map((x, k) => ({ x, y: x > until ? null : (side.median[k] ?? null) }));
	// A is the group that is asked about: full line; B stands behind it.
	return {
		key,
		data,
		ink: inkOf(style.family),
		width: key === 'A' ? 2.3 : GHOST_WIDTH + 0.2,
		dash: style.dash,
		label: key
	};
}

function sideBand(side: Side, key: 'A' | 'B', signal: TraceKey, until: number): PanelBand {
	const within = side.t.filter((x) => x <= until);
	const data = within.map((x, k) => ({ x, low: side.low[k] ?? null, high: side.high[k] ?? null }));
	return { key, data, ink: inkOf(traceStyle(signal).family), opacity: key === 'A' ? 0.3 : 0.16 };
}

/** Medians and quartiles of a group up to an instant. */
function valuesUntil(side: Side, until: number): number[] {
	return side.t.flatMap((t, k) =>
		t > until ? [] : [side.median[k], side.low[k], side.high[k]].map((value) => value ?? Number.NaN)
	);
}

/** Where one of the groups stops being whole, and which. */
function bareFrom({ a, b }: Envelope): Panel['bareFrom'] {
	const ends = [
		{ x: a.wholeUntil, words: 'A no longer whole' },
		{ x: b.wholeUntil, words: 'B no longer whole' }
	].filter((end): end is { x: number; words: string } => end.x !== null);
	ends.sort((one, other) => one.x - other.x);
	return ends[0] ?? null;
}

const isTrace = (key: string): key is TraceKey => isSignalKey(key) || key in DERIVED;

/**
 * Medians with quartile bands of two groups on one panel, aligned at the start, lettered where they run.
 * @param width px of the plot inside its padding
 * @returns null for a signal the product does not know, or an envelope without a single point
 */
export function envelopePanel(
	envelope: Envelope,
	limit: { value: number; text: string } | null,
	width: number,
	height: number
): { panel: Panel; labels: PanelLabel[] } | null {
	const { signal, a, b } = envelope;
	const times = [...a.t, ...b.t];
	if (!isTrace(signal) || times.length < 2) return null;
	const bare = bareFrom(envelope);
	const first = Math.min(...times);
	// A little paper after the group that ends first: enough to say so.
	const xDomain: [number, number] = [first, bare ? bare.x + 0.16 * (bare.x - first) : Math.max(...times)];
	const values = [a, b].flatMap((side) => valuesUntil(side, bare?.x ?? xDomain[1]));
	const axis = panelAxis(limit ? [...values, limit.value] : values, LEAST[envelope.quantity] ?? 4);
	const marks = LANDMARKS.filter((at) => at > xDomain[0] && at <= xDomain[1]);
	const x = (s: number) => ((s - xDomain[0]) / (xDomain[1] - xDomain[0])) * width;
	const [low, high] = axis.domain;
	const y = (v: number) => height - ((v - low) / (high - low)) * height;
	const until = bare?.x ?? xDomain[1];
	const lines = [sideLine(b, 'B', signal, until), sideLine(a, 'A', signal, until)];
	const ink = limit?.text.includes('cut-out') ? 'var(--trip)' : 'var(--ink2)';
	const labels = labelPanel([...lines].reverse(), {
		width: bare ? x(bare.x) : width,
		height,
		x,
		y,
		levels: limit ? [{ key: 'limit', value: limit.value, text: limit.text, ink }] : [],
		uprights: [0, ...marks].map(x),
		startX: x(0)
	});
	// Landmarks too close together share their paper: every second figure is printed.
	const room = marks.filter((at, k) => k === 0 || x(at) - x(marks[k - 1] ?? 0) > 18);
	const panel: Panel = {
		xDomain,
		yDomain: axis.domain,
		xTicks: [0, ...room].map((value) => ({ value, label: String(value) })),
		yTicks: axis.ticks,
		bands: [sideBand(b, 'B', signal, until), sideBand(a, 'A', signal, until)],
		lines,
		levels: limit ? [{ value: limit.value, kind: limit.text.includes('cut-out') ? 'trip' : 'usual' }] : [],
		uprights: [{ x: 0, kind: 'start' }, ...marks.map((at) => ({ x: at, kind: 'landmark' as const }))],
		bareFrom: bare
	};
	return { panel, labels };
}

/** px of a shift on a row's own scale: no shift in the middle, the widest end at the edge. */
export function shiftScale(
	row: Pick<Comparison['differences'][number], 'shift' | 'low' | 'high'>,
	width: number
): ((value: number) => number) | null {
	const most = Math.max(...[row.shift, row.low, row.high].map((value) => Math.abs(value ?? 0)));
	if (!(most > 0)) return null;
	const reach = width / 2 - 5;
	return (value) => width / 2 + (value / most) * reach;
}

/** The signals read at any landmark, each once, in their first order; one that no group has is left out. */
export function landmarkRows(
	landmarks: Comparison['landmarks']
): { signal: string; label: string; quantity: string; described: boolean }[] {
	const read = landmarks.flatMap(({ rows }) => rows).filter(({ a, b }) => a !== null || b !== null);
	const known = new Map(read.map((row) => [row.signal, row]));
	return [...known.values()].map(({ signal, label, quantity, described }) => ({ signal, label, quantity, described }));
}

/** Signals that most often part two groups come first; a page shows the first few and folds the rest. */
const TELLING: readonly string[] = [
	'lift',
	'condWaterIn',
	'evapSaturation',
	'capacity',
	'valvePosition',
	'margin',
	'superheat',
	'evapWaterOut'
];

/** The envelopes in the order they are shown. */
export function inOrder(envelopes: readonly Envelope[]): Envelope[] {
	const place = ({ signal }: Envelope) => (TELLING.includes(signal) ? TELLING.indexOf(signal) : TELLING.length);
	return [...envelopes].sort((a, b) => place(a) - place(b));
}
