import { may, type Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import { FIGURES, PROTECTIONS, type FigureKey, type Protection, type StartRecord } from '$lib/model/start';
import { limitAt, type LimitHistory, type LimitKey } from '$lib/model/unit';
import { PROTECTION_WORDS, SUSPECT_WORDS, TRIP_KIND_WORDS } from '$lib/model/words';
import type { Headroom, StartLink, StartSheet } from '$lib/model/wire/start-sheet';
import { beforeReset } from '$lib/server/analysis/before-reset';
import { sampleSpan } from '$lib/server/repositories/blocks';
import { listLimits } from '$lib/server/repositories/plant';
import { listCircuitResults, listCorrections, listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { coverageOf } from './day-strips';
import { firstMoverShape } from './first-mover-shapes';
import { limitsOf, siteShape, unitShape } from './plant-shapes';
import { siteClock, siteDate, shortDate } from './site-clock';
import { previousShape } from './previous-shapes';
import { figureInUnits, inUnits, iso, startShape, unitsObject } from './start-shapes';
import { visibleStart } from './starts';

/** Everything around one start for its sheet: neighbours, held starts to lay underneath, headroom, advice and clues. */

const HOUR = 3_600_000;

const link = (row: StartRow): StartLink => ({
	id: row.id,
	startedAt: iso(row.startedAt),
	endedAt: row.endedAt === null ? null : iso(row.endedAt),
	outcome: row.outcome,
	firstStart: row.record.firstStart
});

/** How unlike two starts' conditions are: rest class, condenser water and leaving water at the start, and days between. */
function unlikeness(a: StartRecord, b: StartRecord): number {
	const far = (key: FigureKey, scale: number): number => {
		const [x, y] = [a.figures[key], b.figures[key]];
		return x === null || y === null ? 1 : Math.abs(x - y) / scale;
	};
	const rest = a.firstStart === b.firstStart ? 0 : 4;
	const days = Math.abs(a.startedAt - b.startedAt) / (24 * HOUR) / 14;
	return rest + far('condWaterInAtStart', 4) + far('waterOutAtStart', 3) + days;
}

function heldNearest(row: StartRow, rows: readonly StartRow[]): StartRow[] {
	const held = rows.filter((other) => other.id !== row.id && other.outcome === 'held' && !other.record.attended);
	return held.sort((a, b) => unlikeness(row.record, a.record) - unlikeness(row.record, b.record)).slice(0, 12);
}

const LIMIT_OF: Readonly<Record<Protection, LimitKey>> = {
	evapSaturation: 'evapSaturationCutout',
	suctionPressure: 'suctionPressureCutout',
	leavingWater: 'leavingWaterCutout',
	condSaturation: 'condSaturationCutout',
	condPressure: 'condPressureCutout',
	dischargeTemp: 'dischargeTempCutout',
	oilTemp: 'oilTempCutout',
	oilNet: 'oilNetCutout',
	systemDelta: 'systemDeltaCutout',
	margin: 'marginCutout',
	windingTemp: 'windingTempCutout'
};
const LIMIT_QUANTITY: Readonly<
	Record<Protection, 'temperature' | 'pressure' | 'pressureDifference' | 'temperatureDifference'>
> = {
	evapSaturation: 'temperature',
	suctionPressure: 'pressure',
	leavingWater: 'temperature',
	condSaturation: 'temperature',
	condPressure: 'pressure',
	dischargeTemp: 'temperature',
	oilTemp: 'temperature',
	oilNet: 'pressureDifference',
	systemDelta: 'pressureDifference',
	margin: 'temperatureDifference',
	windingTemp: 'temperature'
};

/** Headroom rows worth a line: those with a value, or with a limit and a reason for having none. */
function headroomOf(record: StartRecord, limits: LimitHistory, system: UnitSystem): Headroom[] {
	return PROTECTIONS.flatMap((protection) => {
		const key = `headroom.${protection}` as const;
		const value = record.figures[key];
		const limit = limitAt(limits, LIMIT_OF[protection], record.startedAt);
		if (value === null && !limit) return [];
		const limitQuantity = LIMIT_QUANTITY[protection];
		return [
			{
				protection,
				label: PROTECTION_WORDS[protection],
				quantity: FIGURES[key],
				limitQuantity,
				value: value === null ? null : figureInUnits(key, value, system),
				absent: record.absent[key]?.detail ?? null,
				limit: limit ? inUnits(limit.value, limitQuantity, system) : null,
				provenance: limit?.provenance ?? (value === null ? null : 'learned')
			}
		];
	});
}

const ORDINALS = ['first', 'second', 'third', 'fourth', 'fifth', 'sixth', 'seventh', 'eighth', 'ninth', 'tenth'];

/** "Tripped 06:02:10, 95 s in: high condensing, recorded, sampled every 5 s. Third trip in eight first starts, in the logs given." */
function tripLineOf(row: StartRow, rows: readonly StartRow[], zone: string): string | null {
	const { trip, startedAt, spacingSeconds, firstStart } = row.record;
	if (!trip) return null;
	const inside = Math.round((trip.at - startedAt) / 1000);
	const spent = inside < 600 ? `${inside} s` : `${Math.round(inside / 60)} min`;
	const clock = `${siteClock(trip.at, zone)}:${iso(trip.at).slice(17, 19)}`;
	const before = rows.filter(
		(other) => other.startedAt <= startedAt && (!firstStart || other.record.firstStart) && !other.record.attended
	);
	const n = before.filter((other) => other.outcome === 'tripped').length;
	const rank = ORDINALS[n - 1] ?? `${n}th`;
	const what = firstStart ? 'first starts' : 'starts';
	const basis = trip.basis === 'recorded' ? 'recorded' : `inferred, sureness ${Math.round(trip.sureness * 100)} %`;
	const count = `${rank.charAt(0).toUpperCase()}${rank.slice(1)} trip in ${before.length} ${what}, in the logs given.`;
	return `Tripped ${clock}, ${spent} in: ${TRIP_KIND_WORDS[trip.kind]}, ${basis}, sampled every ${Math.round(spacingSeconds)} s. ${count}`;
}

function titleOf(row: StartRow, zone: string): string {
	const { trip, startedAt, outcome, stall } = row.record;
	const when = `${shortDate(siteDate(startedAt, zone))} ${siteClock(startedAt, zone)}`;
	if (trip) {
		const inside = Math.round((trip.at - startedAt) / 1000);
		return `${when}: tripped ${inside < 600 ? `${inside} s` : `${Math.round(inside / 60)} min`} in, ${TRIP_KIND_WORDS[trip.kind]}`;
	}
	if (stall?.verdict === 'stall') return `${when}: held, but loading stalled at ${Math.round(stall.levelPct)} %`;
	const words = {
		held: 'held',
		'called-off': 'called off',
		lost: 'lost before it could be told',
		unclear: 'stopped, and the log cannot say why',
		tripped: 'tripped'
	};
	return `${when}: ${words[outcome]}`;
}

function stateSince(row: StartRow, lastAt: number | null, later: readonly StartRow[]): StartSheet['stateSinceLastRow'] {
	if (lastAt === null || row.record.outcome !== 'tripped' || row.endedAt === null) return null;
	const next = later[0];
	const minutes = Math.round(((next?.startedAt ?? lastAt) - row.endedAt) / 60_000);
	const sentence = next
		? `It started again after ${minutes} min (${next.outcome}).`
		: `It has not started since; the log goes on for ${minutes} min.`;
	return { lastRowAt: iso(lastAt), sentence };
}

/** The sheet of one start. */
export async function startSheet(actor: Actor, startId: string, system: UnitSystem): Promise<StartSheet> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { row, unit, site } = await visibleStart(tx, actor, startId);
		const corrections = await listCorrections(tx, unit.id);
		const limitRows = await listLimits(tx, [unit.id]);
		const rows = (await listStarts(tx, [unit.id], { circuit: row.circuit })) as StartRow[];
		const at = rows.findIndex((other) => other.id === row.id);
		const zone = site.timeZone;
		const day = siteDate(row.startedAt, zone);
		const result = (await listCircuitResults(tx, [unit.id])).find((entry) => entry.circuit === row.circuit);
		const span = await sampleSpan(tx, unit.id);
		const { record } = row;
		const lastHour = rows.filter(
			(other) => other.startedAt > record.startedAt - HOUR && other.startedAt <= record.startedAt
		).length;
		const suspects = may(actor, 'readSuspects');
		return {
			start: startShape(row, corrections, system),
			clues: suspects
				? row.extras.clues[system].map((clue) => ({
						...clue,
						suspectName: SUSPECT_WORDS[clue.suspect],
						starts: [row.id]
					}))
				: [],
			unit: unitShape(unit, limitRows),
			site: siteShape(site),
			neighbours: {
				previous: rows[at - 1] ? link(rows[at - 1] as StartRow) : null,
				next: rows[at + 1] ? link(rows[at + 1] as StartRow) : null
			},
			held: heldNearest(row, rows).map(link),
			sameDay: rows.filter((other) => siteDate(other.startedAt, zone) === day).map(link),
			title: titleOf(row, zone),
			tripLine: tripLineOf(row, rows, zone),
			firstMover: row.extras.firstMover && firstMoverShape(row.extras.firstMover, system),
			headroom: headroomOf(record, limitsOf(limitRows), system),
			stateSinceLastRow: stateSince(row, span?.to ?? null, rows.slice(at + 1)),
			beforeYouReset: record.trip ? beforeReset(record.trip.kind, lastHour, unit.nature.startsPerHour ?? null) : null,
			previousMethod: row.extras.previous ? previousShape(row.extras.previous, record, system) : null,
			wouldDecide:
				suspects && result?.suspects[system].verdict === 'fault-pattern'
					? (result.suspects[system].suspects[0]?.decisiveCheck.title ?? null)
					: null,
			coverage: result && span ? coverageOf(result.covered, span.from, span.to) : null,
			period: span ? { from: iso(span.from), to: iso(span.to) } : null,
			units: unitsObject(system)
		};
	});
}
