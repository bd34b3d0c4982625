import type { SeriesId } from './signals';

/**
 * One signal's readings in time order.
 * `t`: milliseconds UTC, strictly rising, `v`: stored units (see quantities.ts), NaN = "no reading" (never "off", never zero).
 * On/off signals hold 0 or 1. Series of one file may share the same `t` array, so compare it by reference to know
 * whether two series are row-aligned. Nothing writes to either array once the series is made.
 */
export type Series = {
	readonly t: Float64Array;
	readonly v: Float64Array;
	/** `interval`: one reading a row. `change`: a record only when the value moved (hold rule of method.md). */
	readonly logging: 'interval' | 'change';
	/** Smallest step the column shows; flatness must exceed it before anything is called flat. */
	readonly increment?: number;
	/** Set when the stored unit is not the quantity's usual one (motor current as `pctRated`). */
	readonly measure?: string;
};

/** Words in time order: alarm, mode and limit columns. An empty string is "no text"; a row that repeats is latched. */
export type TextSeries = { readonly t: Float64Array; readonly text: readonly string[] };

/** One line of an alarm or event history, or one rise of an alarm column. */
export type EventRecord = {
	/** ms UTC */
	at: number;
	text: string;
	code?: string;
	/** As the history says it; `unknown` for an alarm column. */
	severity: 'trip' | 'warning' | 'note' | 'unknown';
	what: 'activation' | 'clearing' | 'acknowledgement';
	source: 'column' | 'history';
};

export type SeriesMap = Partial<Record<SeriesId, Series>>;

/** A stretch of time, ms UTC, `from` ≤ `to`. */
export type Interval = { from: number; to: number };
