import type { Quantity } from '$lib/model/quantities';
import { type FigureKey, FIGURES, type StartRecord } from '$lib/model/start';
import { FIGURE_WORDS } from '$lib/model/words';
import { mannKendall } from '../statistics/mann-kendall';
import { median } from '../statistics/median';
import { pettitt } from '../statistics/pettitt';
import { theilSen } from '../statistics/theil-sen';
import { weekOf } from './week';

/** What is followed through a season; `likeLoad` ones only from runs near the unit's usual load. */
export const FOLLOWED: readonly { figure: FigureKey; likeLoad: boolean }[] = [
	{ figure: 'evapApproach', likeLoad: true },
	{ figure: 'condApproach', likeLoad: true },
	{ figure: 'settledMargin', likeLoad: true },
	{ figure: 'settledOilTemp', likeLoad: true },
	{ figure: 'settledSubcooling', likeLoad: true },
	{ figure: 'superheat', likeLoad: true },
	{ figure: 'startCapacity', likeLoad: false },
	{ figure: 'minEvapSaturation', likeLoad: false }
];
/** Like load: settled capacity within this many points of the season's median [ours]. */
const LOAD_REACH = 10;
/** A week's median needs this many runs; a change point this many weeks [ours]. */
const LEAST_RUNS = 2;
const LEAST_WEEKS = 6;

/**
 * What a season must add up to before it is called a drift or a new level, by quantity, stored units: finer than this is
 * below what a controller's sensors repeat [ours].
 */
const LEAST_MOVE: Partial<Record<Quantity, number>> = { temperature: 1, temperatureDifference: 0.5, percent: 4 };

/** One resting offset of a rest, K, as the nights give them. */
export type OffsetReading = { key: string; label: string; at: number; value: number };
export type WeekPoint = { week: string; value: number; count: number };
export type SeasonTrace = {
	key: string;
	label: string;
	quantity: Quantity;
	weeks: WeekPoint[];
	/** The week a new level begins with, when that is clear at 1 in 20. */
	change: { week: string; before: number; after: number } | null;
	/** Theil–Sen drift per week, when a trend is clear at 1 in 20; null otherwise. */
	driftPerWeek: number | null;
	/** How far the season moved it, in least moves worth naming; 0 when neither drift nor new level is clear. */
	weight: number;
};

function weekly(readings: readonly { at: number; value: number }[], timeZone: string): WeekPoint[] {
	const weeks = new Map<string, number[]>();
	for (const { at, value } of readings) {
		const week = weekOf(at, timeZone);
		weeks.set(week, [...(weeks.get(week) ?? []), value]);
	}
	return [...weeks]
		.filter(([, values]) => values.length >= LEAST_RUNS)
		.map(([week, values]) => ({ week, value: median(values) ?? NaN, count: values.length }))
		.sort((a, b) => (a.week < b.week ? -1 : 1));
}

function traceOf(
	key: string,
	label: string,
	quantity: Quantity,
	readings: readonly { at: number; value: number }[],
	timeZone: string
): SeasonTrace | null {
	const weeks = weekly(readings, timeZone);
	if (weeks.length === 0) return null;
	const values = weeks.map((one) => one.value);
	const found = weeks.length >= LEAST_WEEKS ? pettitt(values) : null;
	const first = found && found.twoSided <= 0.05 ? weeks[found.index] : undefined;
	const trend = mannKendall(values);
	const line = theilSen(
		weeks.map((one) => Date.parse(one.week) / (7 * 86_400_000)),
		values
	);
	const least = LEAST_MOVE[quantity] ?? 0;
	const level =
		found && first
			? {
					week: first.week,
					before: median(values.slice(0, found.index)) ?? NaN,
					after: median(values.slice(found.index)) ?? NaN
				}
			: null;
	const change = level && Math.abs(level.after - level.before) >= least ? level : null;
	const slope = trend && trend.twoSided <= 0.05 && line ? line.slope : null;
	const drifted = slope === null ? 0 : Math.abs(slope) * (weeks.length - 1);
	const driftPerWeek = drifted >= least ? slope : null;
	const moved = Math.max(change ? Math.abs(change.after - change.before) : 0, driftPerWeek === null ? 0 : drifted);
	return { key, label, quantity, weeks, change, driftPerWeek, weight: least > 0 ? moved / least : moved };
}

/**
 * The rolling season: weekly medians of settled figures at like load, of capacity at start and of resting offsets, with
 * the week of a change of level (Pettitt) and the drift (Theil–Sen where Mann–Kendall is clear). A slow fouling or leak
 * shows here before it trips. What moved most comes first. Attended starts and lay-ups are left out; a figure nobody has is left out.
 */
export function rollingSeason(
	starts: readonly StartRecord[],
	timeZone: string,
	offsets: readonly OffsetReading[] = []
): SeasonTrace[] {
	const counted = starts.filter((start) => !start.attended && !start.layUp);
	const usual = median(counted.map((start) => start.figures.settledCapacity ?? NaN));
	const alike = (start: StartRecord) => {
		const load = start.figures.settledCapacity;
		return usual === null || (load !== null && Math.abs(load - usual) <= LOAD_REACH);
	};
	const figures = FOLLOWED.map(({ figure, likeLoad }) =>
		traceOf(
			figure,
			FIGURE_WORDS[figure],
			FIGURES[figure],
			counted.flatMap((start) => {
				const value = start.figures[figure];
				return value === null || (likeLoad && !alike(start)) ? [] : [{ at: start.startedAt, value }];
			}),
			timeZone
		)
	);
	const keys = [...new Map(offsets.map((one) => [one.key, one.label]))];
	const resting = keys.map(([key, label]) =>
		traceOf(
			key,
			label,
			'temperatureDifference',
			offsets.filter((one) => one.key === key),
			timeZone
		)
	);
	const traces = [...figures, ...resting].filter((trace) => trace !== null);
	return traces.sort((a, b) => b.weight - a.weight);
}
