import type { EventRecord, Interval, Series, SeriesMap, TextSeries } from './series';
import type { StartCorrection, StartRecord, TripKind } from './start';
import type { LimitHistory, Refrigerant, UnitNature } from './unit';

/** A trade word that names a trip kind; the unit's own come before the product's. */
export type TripWord = { words: string; kind: TripKind };

/** Everything the analysis of one circuit needs; unit-wide signals are in `series` of every circuit. */
export type CircuitInput = {
	circuit: string;
	series: SeriesMap;
	/** Mode, limit and alarm columns as words. */
	texts: { unitMode?: TextSeries; activeLimit?: TextSeries; alarm?: TextSeries };
	/** Alarm or event histories, in time order. */
	events: readonly EventRecord[];
	nature: UnitNature;
	refrigerant: Refrigerant;
	/** IANA zone of the site. */
	timeZone: string;
	limits: LimitHistory;
	/** Stretches with a person at the unit. */
	visits: readonly Interval[];
	tripWords: readonly TripWord[];
	corrections: readonly StartCorrection[];
	/** `running` of the unit's other circuits and of the site's other units (for power failures and staging). */
	others: readonly { name: string; sameUnit: boolean; running: Series }[];
};

/** What the analysis of one circuit gives. */
export type CircuitAnalysis = {
	circuit: string;
	starts: StartRecord[];
	/** Stretches with readings of the deciding signals. */
	covered: Interval[];
	/** The smallest event the spacing can show, seconds. */
	smallestEventSeconds: number | null;
	/** Alarm clocks that differ from the log's: the shift that matches most, seconds (a person confirms). */
	proposedAlarmShift: number | null;
	notes: string[];
};

export const METHOD_VERSION = '1';
