import { FIGURES, FIGURE_KEYS, type FigureKey } from '$lib/model/start';
import { apiMeasure, fromStored, MEASURES, type Quantity, type UnitSystem } from '$lib/model/quantities';
import type { Units } from '$lib/model/wire/common';
import type { Start } from '$lib/model/wire/start';
import type { CorrectionRow, StartRow } from '$lib/server/repositories/starts';

/** Starts as the API gives them: ISO instants, and figures in the units asked for. */

const PER_HOUR: ReadonlySet<string> = new Set(['marginSlope', 'oilTempSlope']);
const KW_PER_TON = 3.5168528420667;

const SHOWN: readonly Quantity[] = [
	'temperature',
	'temperatureDifference',
	'temperatureRate',
	'pressure',
	'pressureDifference',
	'flow',
	'power',
	'duty',
	'percent',
	'current',
	'frequency',
	'voltage',
	'duration'
];

/** The `units` object of an answer: quantity → unit of measure, and the figures that differ from their quantity. */
export function unitsObject(system: UnitSystem): Units {
	const units: Units = {};
	for (const quantity of SHOWN) units[quantity] = MEASURES[apiMeasure(quantity, system)].symbol;
	for (const key of PER_HOUR) units[key] = system === 'ip' ? '°F/h' : 'K/h';
	units['degreeSecondsBelowCutout'] = system === 'ip' ? '°F·s' : 'K·s';
	units['powerPerDuty'] = system === 'ip' ? 'kW/ton' : 'kW/kW';
	return units;
}

/** A stored value in the units of an answer (pressures absolute). */
export const inUnits = (value: number, quantity: Quantity, system: UnitSystem): number =>
	fromStored(value, apiMeasure(quantity, system));

/** One figure in the units of an answer. */
export function figureInUnits(key: FigureKey, value: number, system: UnitSystem): number {
	if (key === 'powerPerDuty') return system === 'ip' ? value * KW_PER_TON : value;
	return inUnits(value, FIGURES[key], system);
}

export const iso = (ms: number): string => new Date(ms).toISOString();
const span = ({ from, to }: { from: number; to: number }) => ({ from: iso(from), to: iso(to) });

const SAME_START_MS = 120_000;

/** The newest correction that concerns a start. */
export function correctionOf(
	row: { circuit: string; startedAt: number },
	corrections: readonly CorrectionRow[]
): Start['corrected'] {
	const found = corrections.findLast((entry) => {
		const at = entry.correction.newStartedAt ?? entry.startedAt;
		return (
			entry.circuit === row.circuit &&
			Math.min(Math.abs(entry.startedAt - row.startedAt), Math.abs(at - row.startedAt)) <= SAME_START_MS
		);
	});
	return found ? { reason: found.reason, by: found.byName, at: found.at.toISOString() } : null;
}

/** A stored start as the API gives it. */
export function startShape(row: StartRow, corrections: readonly CorrectionRow[], system: UnitSystem): Start {
	const { record } = row;
	const figures: Record<string, number | null> = {};
	const absent: Record<string, string> = {};
	const absentReasons: Start['absentReasons'] = {};
	for (const key of FIGURE_KEYS) {
		const value = record.figures[key];
		figures[key] = value === null || value === undefined ? null : figureInUnits(key, value, system);
		const why = record.absent[key];
		if (figures[key] === null && why) {
			absent[key] = why.detail;
			absentReasons[key] = why.reason;
		}
	}
	return {
		id: row.id,
		unitId: row.unitId,
		circuit: row.circuit,
		source: row.source,
		startedAt: iso(record.startedAt),
		endedAt: record.endedAt === null ? null : iso(record.endedAt),
		uncertaintySeconds: record.uncertaintySeconds,
		endUncertaintySeconds: record.endUncertaintySeconds,
		spacingSeconds: record.spacingSeconds,
		outcome: record.outcome,
		outcomeReason: record.outcomeReason,
		startupTrip: record.startupTrip,
		firstStart: record.firstStart,
		restSeconds: record.restSeconds,
		restAtLeast: record.restAtLeast,
		layUp: record.layUp,
		episode: record.episode === null ? null : iso(record.episode),
		tryNumber: record.tryNumber,
		attended: record.attended,
		othersRunning: record.othersRunning,
		trip: record.trip && { ...record.trip, at: iso(record.trip.at) },
		stall: record.stall && { ...record.stall, ...span(record.stall) },
		settled: record.settled && span(record.settled),
		holes: record.holes.map(span),
		runningFrom: record.runningFrom,
		notes: [...record.notes],
		figures,
		absent,
		absentReasons,
		marks: record.marks as Start['marks'],
		corrected: correctionOf(row, corrections),
		methodVersion: record.methodVersion,
		units: unitsObject(system)
	};
}
