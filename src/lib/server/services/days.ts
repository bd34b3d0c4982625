import { AppError } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import type { Days, Pin } from '$lib/model/wire/views';
import { limitAt } from '$lib/model/unit';
import { sampleSpan } from '$lib/server/repositories/blocks';
import { listCases, listChanges, listVisits } from '$lib/server/repositories/circle';
import { listLimits } from '$lib/server/repositories/plant';
import { listCircuitResults, listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { now } from '$lib/server/config';
import { coverageOf, dayStrips, joinCovered } from './day-strips';
import { limitsOf } from './plant-shapes';
import { addDays, dayStart, siteClock, siteDate } from './site-clock';
import { inUnits, unitsObject } from './start-shapes';
import { visibleUnit } from './units';

const WEEKS = 6;
const DAY_MS = 86_400_000;

type Query = { from?: string; to?: string; circuit?: string };

/** The dates shown: as asked for, else six weeks up to the last log. */
function periodOf(query: Query, span: { from: number; to: number } | null, zone: string): { from: string; to: string } {
	const to = query.to ?? siteDate(span?.to ?? now().getTime(), zone);
	const first = span ? siteDate(span.from, zone) : addDays(to, -13);
	const sixWeeks = addDays(to, -(WEEKS * 7 - 1));
	const from = query.from ?? (first > sixWeeks ? first : sixWeeks);
	if (from > to) throw new AppError('invalid', '“from” must not be after “to”.');
	return { from, to };
}

async function pinsOf(tx: Tx, unitId: string, zone: string): Promise<Pin[]> {
	const pin = (kind: Pin['kind'], id: string, at: Date, text: string): Pin => ({
		kind,
		id,
		at: at.toISOString(),
		date: siteDate(at.getTime(), zone),
		clock: siteClock(at.getTime(), zone),
		text
	});
	const pins = (await listChanges(tx, unitId)).map((row) =>
		pin('change', row.id, row.at, `${row.text}, ${row.byName}`)
	);
	for (const row of await listCases(tx, [unitId])) pins.push(pin('case', row.id, row.openedAt, row.complaint));
	for (const row of await listVisits(tx, [unitId])) {
		const at = row.arrivedAt ?? new Date(dayStart(row.date, zone) + clockMinutes(row.beThereBy ?? '12:00') * 60_000);
		pins.push(pin('visit', row.id, at, row.result ?? 'planned'));
	}
	return pins.sort((a, b) => (a.at < b.at ? -1 : 1));
}

/** Where a unit has no samples, its record of starts spans the days. */
async function notedSpan(tx: Tx, unitId: string): Promise<{ from: number; to: number } | null> {
	const rows = await listStarts(tx, [unitId], { source: 'noted' });
	const [first, last] = [rows[0], rows.at(-1)];
	return first && last ? { from: first.startedAt, to: last.endedAt ?? last.startedAt } : null;
}

const clockMinutes = (clock: string): number => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3, 5));

const minuteOf = (row: StartRow, zone: string): number =>
	(row.startedAt - dayStart(siteDate(row.startedAt, zone), zone)) / 60_000;

/** The shortest stretch of clock, at most two hours, that holds the most start-up trips; null under three trips or 60 % inside. */
export function tripCluster(trips: readonly number[], others: readonly number[]): Days['cluster'] {
	const sorted = [...trips].sort((a, b) => a - b);
	if (sorted.length < 3) return null;
	let best = { from: 0, to: 0, inside: 0 };
	sorted.forEach((from, i) => {
		const inside = sorted.filter((minute, j) => j >= i && minute <= from + 120);
		const to = inside.at(-1) ?? from;
		const better = inside.length > best.inside || (inside.length === best.inside && to - from < best.to - best.from);
		if (better) best = { from, to, inside: inside.length };
	});
	if (best.inside < sorted.length * 0.6) return null;
	const from = Math.floor((best.from - 2) / 5) * 5;
	const to = Math.ceil((best.to + 2) / 5) * 5;
	const outside = others.filter((minute) => minute < from || minute > to);
	return {
		from,
		to,
		inside: best.inside,
		trips: sorted.length,
		otherTrips: sorted.length - best.inside,
		others: outside.length
	};
}

function titleOf(rows: readonly StartRow[], cluster: Days['cluster'], noted: readonly StartRow[]): string {
	const trips = rows.filter((row) => row.record.startupTrip);
	if (rows.length === 0 && noted.length > 0) {
		const tripped = noted.filter((row) => row.outcome === 'tripped').length;
		return `No trend log; ${tripped} of ${noted.length} starts on record tripped`;
	}
	if (rows.length === 0) return 'No start in these logs yet';
	if (trips.length === 0) {
		const late = rows.filter((row) => row.outcome === 'tripped').length;
		if (late > 0) return `${late === 1 ? 'One run' : `${late} runs`} tripped after the start-up window, none inside it`;
		return `None of ${rows.length} starts tripped`;
	}
	const clock = (minute: number): string =>
		`${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(Math.round(minute % 60)).padStart(2, '0')}`;
	if (cluster)
		return `${cluster.inside} of ${cluster.trips} start-up trips lie between ${clock(cluster.from)} and ${clock(cluster.to)}`;
	const first = trips.filter((row) => row.record.firstStart).length;
	if (first === 1 && trips.length === 1) return 'The one start-up trip was a first start';
	if (first === trips.length) return `Every one of ${trips.length} start-up trips was a first start`;
	return `${trips.length} of ${rows.length} starts tripped inside the start-up window`;
}

/** The day strips of a unit (one circuit when asked), with what is pinned between the days. */
export async function daysOf(actor: Actor, unitId: string, query: Query, system: UnitSystem): Promise<Days> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { site } = await visibleUnit(tx, actor, unitId);
		const zone = site.timeZone;
		const span = (await sampleSpan(tx, unitId)) ?? (await notedSpan(tx, unitId));
		const { from, to } = periodOf(query, span, zone);
		const begin = dayStart(from, zone);
		const end = dayStart(addDays(to, 1), zone);
		const filter = {
			source: 'all' as const,
			from: begin - 3 * DAY_MS,
			to: end,
			...(query.circuit ? { circuit: query.circuit } : {})
		};
		const all = await listStarts(tx, [unitId], filter);
		const rows = all.filter((row) => row.source === 'log');
		const results = (await listCircuitResults(tx, [unitId])).filter(
			(row) => !query.circuit || row.circuit === query.circuit
		);
		const covered = joinCovered(results.map((row) => row.covered));
		const limits = limitsOf(await listLimits(tx, [unitId]));
		const inside = rows.filter((row) => row.startedAt >= begin);
		const trips = inside.filter((row) => row.record.startupTrip);
		const held = inside.filter((row) => row.outcome === 'held');
		const cluster = tripCluster(
			trips.map((row) => minuteOf(row, zone)),
			held.map((row) => minuteOf(row, zone))
		);
		const days = dayStrips(all, covered, from, to, zone, covered.at(-1)?.[1] ?? end).map((strip) => {
			const today = inside.filter((row) => siteDate(row.startedAt, zone) === strip.date);
			const first = today.find((row) => row.record.firstStart) ?? null;
			const least = today.map((row) => row.record.figures.minEvapSaturation).filter((value) => value !== null);
			const lowest = least.length > 0 ? Math.min(...least) : null;
			const cutout = limitAt(limits, 'evapSaturationCutout', dayStart(strip.date, zone));
			const water = (first ?? today[0])?.record.figures.condWaterInAtStart ?? null;
			return {
				...strip,
				first: first?.outcome ?? null,
				starts: today.length,
				trips: today.filter((row) => row.record.startupTrip).length,
				condWaterInAtStart: water === null ? null : inUnits(water, 'temperature', system),
				minEvapSaturation: lowest === null ? null : inUnits(lowest, 'temperature', system),
				belowCutout: lowest !== null && cutout !== null && lowest < cutout.value
			};
		});
		return {
			days,
			pins: (await pinsOf(tx, unitId, zone)).filter((pin) => pin.date >= from && pin.date <= to),
			cluster,
			title: titleOf(
				inside,
				cluster,
				all.filter((row) => row.source !== 'log' && row.startedAt >= begin)
			),
			from,
			to,
			coverage: coverageOf(covered, begin, Math.min(end, now().getTime())),
			timeZone: zone,
			units: unitsObject(system)
		};
	});
}
