import { panelAxis } from '$lib/components/charts/panel-layout';
import type { Panel } from '$lib/components/charts/PaperPanel.svelte';
import { familyOf, inkOf, traceStyle } from '$lib/components/charts/trace-style';
import type { TraceKey } from '$lib/model/signals';
import type { Season } from '$lib/model/wire/season';
import { formatNumber } from '$lib/utils/format';

export type SeasonTrace = Season['traces'][number];

const WEEK_MS = 7 * 86_400_000;
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;

/** Whose ink a followed figure is drawn in. Resting offsets are between two sensors: plain ink. */
const TRACE_OF: Readonly<Record<string, TraceKey>> = {
	evapApproach: 'evapSaturation',
	condApproach: 'condSaturation',
	settledMargin: 'margin',
	settledOilTemp: 'oilTemp',
	settledSubcooling: 'condSaturation',
	superheat: 'superheat',
	startCapacity: 'capacity',
	minEvapSaturation: 'evapSaturation'
};

/** The least span worth drawing, so that a level season is not blown up: by quantity, in printed units. */
const LEAST: Readonly<Record<string, number>> = { percent: 20, temperature: 10 };

/** A week as the axis prints it: "12 Jan". */
export function printWeek(week: string): string {
	const [, month, day] = week.split('-').map(Number);
	return `${day} ${MONTHS[(month ?? 1) - 1]}`;
}

/**
 * Weekly medians as points on a line, the week of a new level as an upright, at most `most` weeks printed.
 * Gaps of a week or more are not bridged.
 */
export function seasonPanel(trace: SeasonTrace, most = 4): Panel {
	const key = TRACE_OF[trace.key];
	const ink = key ? inkOf(familyOf(key)) : 'var(--ink)';
	const style = key ? traceStyle(key) : { width: 1.4, dash: null };
	const points = trace.weeks.map(({ week, value }) => ({ x: Date.parse(week), y: value }));
	const first = points[0]?.x ?? 0;
	const last = points.at(-1)?.x ?? first;
	const data = points.flatMap((point, k) => {
		const before = points[k - 1];
		const gap = before && point.x - before.x > 1.5 * WEEK_MS;
		return gap ? [{ x: point.x - 1, y: null }, point] : [point];
	});
	const axis = panelAxis(
		points.map(({ y }) => y),
		LEAST[trace.quantity] ?? 4
	);
	const every = Math.max(1, Math.ceil(points.length / most));
	return {
		xDomain: [first - WEEK_MS / 2, last + WEEK_MS / 2],
		yDomain: axis.domain,
		xTicks: trace.weeks
			.filter((_, k) => k % every === 0)
			.map(({ week }) => ({ value: Date.parse(week), label: printWeek(week) })),
		yTicks: axis.ticks,
		bands: [],
		lines: [{ key: trace.key, data, ink, width: style.width, dash: style.dash }],
		points: points.map((point) => ({ ...point, ink })),
		levels: [],
		uprights: trace.change ? [{ x: Date.parse(trace.change.week) - WEEK_MS / 2, kind: 'landmark' }] : []
	};
}

/** What a trace did over the season, in words. `symbol` is its printed unit of measure. */
export function seasonWords(trace: SeasonTrace, symbol: string): string {
	const digits = trace.quantity === 'percent' ? 0 : 1;
	const say = (value: number, sign = false) => formatNumber(value, digits, { sign });
	if (trace.driftPerWeek !== null) {
		const over = trace.driftPerWeek * (trace.weeks.length - 1);
		return `${over > 0 ? 'rises' : 'falls'}: ${say(over, true)} ${symbol} in ${trace.weeks.length} weeks`;
	}
	if (trace.change) {
		const { before, after, week } = trace.change;
		return `new level from the week of ${printWeek(week)}: ${say(before)} to ${say(after)} ${symbol}`;
	}
	return trace.weeks.length > 5 ? 'level' : `${trace.weeks.length} weeks: too few to tell`;
}
