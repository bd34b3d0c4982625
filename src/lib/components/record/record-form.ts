import { READING_MOMENTS, type ReadingMoment } from '$lib/model/noted';
import { MEASURES, pageMeasure, toStored, type MeasureKey, type UnitSystem } from '$lib/model/quantities';
import { SIGNALS, type SignalKey } from '$lib/model/signals';
import type { TripKind } from '$lib/model/start';
import type { NotedInputSent } from '$lib/model/wire/noted';
import { siteInstant } from '$lib/utils/clock';
import { numberTyped } from '$lib/utils/number-typed';

/** What the forms of the record hold while a person types, and the bodies they become. */

export type TypedReading = { signal: SignalKey; value: string; moment: ReadingMoment };
export type TypedStart = {
	circuit: string;
	startedAt: string;
	endedAt: string;
	outcome: 'tripped' | 'held' | 'called-off' | 'unclear';
	tripKind: TripKind | '';
	text: string;
	attended: boolean;
	note: string;
	readings: TypedReading[];
};
export type TypedCounters = { circuit: string; at: string; starts: string; runHours: string; note: string };

export const MOMENT_WORDS: Readonly<Record<ReadingMoment, string>> = {
	before: 'before the start',
	running: 'while it ran',
	'at-stop': 'at the stop'
};
export const MOMENTS = READING_MOMENTS.map((value) => ({ value, label: MOMENT_WORDS[value] }));

/** Signals worth typing off a screen or a gauge, in the order a person meets them. */
export const TYPED_SIGNALS: readonly SignalKey[] = [
	'evapSaturation',
	'evapPressure',
	'condSaturation',
	'condPressure',
	'evapWaterIn',
	'evapWaterOut',
	'condWaterIn',
	'condWaterOut',
	'oilTemp',
	'oilPressure',
	'suctionTemp',
	'dischargeTemp',
	'capacity',
	'demand',
	'motorCurrent',
	'valvePosition',
	'outdoorTemp'
];

/** The unit of measure a signal is typed in: as gauges read. */
export const measureOf = (signal: SignalKey, system: UnitSystem): MeasureKey =>
	pageMeasure(SIGNALS[signal].quantity, system);
export const symbolOf = (signal: SignalKey, system: UnitSystem): string => MEASURES[measureOf(signal, system)].symbol;

type Site = { timeZone: string; air: number };

/** A start as the API takes it; blank readings are left out, and what is no number is left for the schema to refuse. Clocks are the site's. */
export function startBody(typed: TypedStart, site: Site, system: UnitSystem): NotedInputSent {
	const readings = typed.readings.flatMap(({ signal, value, moment }) => {
		const read = numberTyped(value);
		return read === null ? [] : [{ signal, moment, value: toStored(read, measureOf(signal, system), site.air) }];
	});
	return {
		kind: 'start',
		circuit: typed.circuit as '1',
		startedAt: siteInstant(typed.startedAt, site.timeZone),
		endedAt: siteInstant(typed.endedAt, site.timeZone),
		outcome: typed.outcome,
		tripKind: typed.outcome === 'tripped' && typed.tripKind !== '' ? typed.tripKind : null,
		text: typed.text,
		attended: typed.attended,
		note: typed.note,
		readings
	};
}

/** The counters as the API takes them. */
export function countersBody(typed: TypedCounters, site: Site): NotedInputSent {
	return {
		kind: 'counters',
		circuit: typed.circuit as '1',
		at: siteInstant(typed.at, site.timeZone) ?? '',
		starts: numberTyped(typed.starts),
		runHours: numberTyped(typed.runHours),
		note: typed.note
	};
}
