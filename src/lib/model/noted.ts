import type { SignalKey } from './signals';
import type { Outcome, TripKind } from './start';

/**
 * A record of starts where there is no trend log: typed in by a person, taken from an alarm list, or told by the
 * counters of starts and running hours. It never has traces or figures and is kept out of rates and proof, because
 * people write down the starts that trip and not the ones that hold.
 */

/** When a typed reading was taken. */
export const READING_MOMENTS = ['before', 'running', 'at-stop'] as const;
export type ReadingMoment = (typeof READING_MOMENTS)[number];

/** One figure off the controller's screen or a gauge; stored unit of its signal. */
export type NotedReading = { signal: SignalKey; value: number; moment: ReadingMoment };

/** A start as a person knows it: `startedAt` or `endedAt` (ms UTC) may be unknown, not both. */
export type NotedStartBody = {
	kind: 'start';
	startedAt: number | null;
	endedAt: number | null;
	outcome: Exclude<Outcome, 'lost'>;
	tripKind: TripKind | null;
	/** what the controller said */
	text: string;
	attended: boolean;
	readings: NotedReading[];
	note: string;
};

/** What the counters showed at one instant; null where one was not read. */
export type NotedCountersBody = { kind: 'counters'; starts: number | null; runHours: number | null; note: string };

export type NotedBody = NotedStartBody | NotedCountersBody;

/** Starts and running time between two readings of the counters. */
export type CounterStretch = {
	circuit: string;
	/** ms UTC of both readings */
	from: number;
	to: number;
	/** null where a reading is missing at either end, or the counter went back (replaced or reset) */
	starts: number | null;
	runSeconds: number | null;
	/** running time a start, seconds; null without both, or without a start */
	meanRunSeconds: number | null;
	/** at least this many of the starts ended inside the start-up window; null where that cannot be told */
	shortAtLeast: number | null;
	wentBack: boolean;
	basis: 'typed' | 'logged';
};
