import type { EventRecord, Interval, Series, SeriesMap, TextSeries } from './series';
import type { Protection, StartCorrection, StartRecord, TripKind } from './start';
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
	others: readonly { name: string; sameUnit: boolean; running: Series; capacity?: Series }[];
	/** The shift of the alarm history's clock that a person confirmed, seconds to add; 0 = none; absent = propose one. */
	alarmShiftSeconds?: number | null;
};

/** A protection's limit as the unit's own starts show it. Values in stored units. */
export type LearnedBracket = {
	protection: Protection;
	/** The value at a trip that is nearest the survived side. */
	trippedAt: number;
	/** The nearest to a trip that a held start survived; null when none was read. */
	survivedAt: number | null;
	/** The middle of both; where it tripped when nothing was survived or the bracket is inverted. */
	limit: number;
	/** A held start went past a tripping value: this quantity is not what trips it. */
	inverted: boolean;
	trips: number;
	survivals: number;
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
	/** Limits learned from this log's trips and held starts, by protection. */
	brackets: LearnedBracket[];
	notes: string[];
};

export const METHOD_VERSION = '2';
