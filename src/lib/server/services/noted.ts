import { AppError, notFound } from '$lib/model/errors';
import type { NotedBody, NotedReading } from '$lib/model/noted';
import type { Actor } from '$lib/model/people';
import { apiMeasure, fromStored, MEASURES, type UnitSystem } from '$lib/model/quantities';
import { isSignalKey, SIGNALS } from '$lib/model/signals';
import { limitAt } from '$lib/model/unit';
import type { NotedEntry, NotedInput, UnitRecord } from '$lib/model/wire/noted';
import { counterStretches, type CounterReading } from '$lib/server/analysis/noted/counters';
import { demand } from '$lib/server/auth/guard';
import { enqueueAnalysis } from '$lib/server/jobs/queue';
import { recordAudit } from '$lib/server/repositories/audit';
import { deleteNoted, findNoted, insertNoted, listNoted, type NotedRow } from '$lib/server/repositories/noted';
import { listLimits, type SiteRow, type UnitRow } from '$lib/server/repositories/plant';
import { listCircuitResults, listCorrections, listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { circuitsOf } from './analysing';
import { circuitFits, happenedAt } from './checks';
import { limitsOf } from './plant-shapes';
import { loadSeries } from './series';
import { siteDate } from './site-clock';
import { iso, startShape, unitsObject } from './start-shapes';
import { visibleUnit } from './units';

/** The record of a unit's starts without a trend log: typed entries, alarm lists, counters. */

const NEAR_MS = 10 * 60_000;

function bodyOf(input: NotedInput): { at: number; body: NotedBody } {
	if (input.kind === 'counters') {
		const { starts, runHours, note } = input;
		return { at: happenedAt(input.at).getTime(), body: { kind: 'counters', starts, runHours, note } };
	}
	const started = input.startedAt === null ? null : happenedAt(input.startedAt).getTime();
	const ended = input.endedAt === null ? null : happenedAt(input.endedAt).getTime();
	const { outcome, tripKind, text, attended, note } = input;
	const readings = input.readings.flatMap((reading) => {
		const { signal } = reading;
		if (!isSignalKey(signal) || SIGNALS[signal].form === 'text')
			throw new AppError('invalid', `“${signal}” cannot be typed as a figure.`);
		return [{ ...reading, signal }];
	});
	const kind = outcome === 'tripped' ? tripKind : null;
	const body = { startedAt: started, endedAt: ended, outcome, tripKind: kind, text, attended, readings, note };
	return { at: started ?? ended ?? 0, body: { kind: 'start', ...body } };
}

/** Keeps a typed start or a reading of the counters. The same client key again gives the first one back. */
export async function recordNoted(
	actor: Actor,
	unitId: string,
	input: NotedInput
): Promise<{ id: string; repeated: boolean }> {
	demand(actor, 'field');
	const { at, body } = bodyOf(input);
	const result = await withOrganisation(actor.organisationId, async (tx) => {
		const { unit } = await visibleUnit(tx, actor, unitId);
		circuitFits(input.circuit, unit);
		const { row, repeated } = await insertNoted(tx, {
			organisationId: actor.organisationId,
			clientKey: input.clientKey ?? null,
			unitId,
			circuit: input.circuit,
			at,
			body,
			by: actor.personId,
			byName: actor.name
		});
		if (row.unitId !== unitId) throw new AppError('conflict', 'This client key came with an entry of another unit.');
		if (!repeated)
			await recordAudit(tx, actor, { action: 'added', subject: 'noted start', subjectId: row.id, after: input });
		return { id: row.id, repeated };
	});
	if (!result.repeated) await enqueueAnalysis({ organisationId: actor.organisationId, unitId });
	return result;
}

/** Takes an entry away. @throws AppError `not-found` */
export async function removeNoted(actor: Actor, unitId: string, id: string): Promise<void> {
	demand(actor, 'field');
	await withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		const row = await findNoted(tx, id);
		if (row?.unitId !== unitId) throw notFound('entry');
		await deleteNoted(tx, id);
		await recordAudit(tx, actor, { action: 'removed', subject: 'noted start', subjectId: id, before: row.body });
	});
	await enqueueAnalysis({ organisationId: actor.organisationId, unitId });
}

function shownReading(reading: NotedReading, system: UnitSystem) {
	const measure = apiMeasure(SIGNALS[reading.signal].quantity, system);
	return { ...reading, value: fromStored(reading.value, measure), unit: MEASURES[measure].symbol };
}

type Covered = ReadonlyMap<string, readonly (readonly [number, number])[]>;

function entryShape(row: NotedRow, covered: Covered, logged: readonly StartRow[], system: UnitSystem): NotedEntry {
	const { body } = row;
	const start = body.kind === 'start' ? body : null;
	const counters = body.kind === 'counters' ? body : null;
	const stretch = covered.get(row.circuit)?.find(([from, to]) => row.at >= from && row.at <= to);
	const near = logged
		.filter((other) => other.circuit === row.circuit)
		.find((other) => Math.abs(other.startedAt - row.at) <= NEAR_MS);
	const isoOf = (ms: number | null | undefined): string | null => (ms === null || ms === undefined ? null : iso(ms));
	return {
		id: row.id,
		unitId: row.unitId,
		kind: body.kind,
		circuit: row.circuit,
		at: iso(row.at),
		startedAt: isoOf(start?.startedAt),
		endedAt: isoOf(start?.endedAt),
		outcome: start?.outcome ?? null,
		text: start?.text ?? '',
		note: body.note,
		starts: counters?.starts ?? null,
		runHours: counters?.runHours ?? null,
		readings: (start?.readings ?? []).map((reading) => shownReading(reading, system)),
		covered: start !== null && stretch !== undefined,
		loggedStart: (start !== null && near?.id) || null,
		by: row.byName,
		createdAt: row.createdAt.toISOString()
	};
}

/** Counters that a log carries for a circuit whose running it does not tell: the first row and the last of each day. */
async function loggedCounters(tx: Tx, unit: UnitRow, site: SiteRow, covered: Covered): Promise<CounterReading[]> {
	const untold = circuitsOf(unit).filter((circuit) => (covered.get(circuit) ?? []).length === 0);
	if (untold.length === 0) return [];
	const maps = await loadSeries(tx, unit.id, untold, { signals: ['startsCounter', 'runHours'] });
	const readings: CounterReading[] = [];
	for (const [circuit, { startsCounter, runHours }] of maps) {
		const at = new Map<number, { starts: number | null; runHours: number | null }>();
		const take = (series: typeof startsCounter, key: 'starts' | 'runHours'): void => {
			if (!series) return;
			const lastOfDay = new Map<string, number>();
			series.t.forEach((t, i) => {
				if (!Number.isNaN(series.v[i])) lastOfDay.set(i === 0 ? 'first' : siteDate(t, site.timeZone), i);
			});
			for (const i of lastOfDay.values()) {
				const t = series.t[i] ?? 0;
				at.set(t, { starts: null, runHours: null, ...at.get(t), [key]: series.v[i] ?? null });
			}
		};
		take(startsCounter, 'starts');
		take(runHours, 'runHours');
		for (const [t, values] of at) readings.push({ circuit, at: t, ...values, basis: 'logged' });
	}
	return readings;
}

/** A unit's record of starts without a trend log. */
export async function recordOf(actor: Actor, unitId: string, system: UnitSystem): Promise<UnitRecord> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { unit, site } = await visibleUnit(tx, actor, unitId);
		const rows = await listNoted(tx, unitId);
		const covered: Covered = new Map(
			(await listCircuitResults(tx, [unitId])).map((row) => [row.circuit, row.covered] as const)
		);
		const starts = await listStarts(tx, [unitId], { source: 'all' });
		const logged = starts.filter((row) => row.source === 'log');
		const corrections = await listCorrections(tx, unitId);
		const typed = rows.flatMap(({ body, circuit, at }): CounterReading[] =>
			body.kind === 'counters' ? [{ circuit, at, starts: body.starts, runHours: body.runHours, basis: 'typed' }] : []
		);
		const window = limitAt(limitsOf(await listLimits(tx, [unitId])), 'startUpWindow', Infinity)?.value ?? 1200;
		const stretches = counterStretches([...typed, ...(await loggedCounters(tx, unit, site, covered))], window);
		return {
			starts: starts.filter((row) => row.source !== 'log').map((row) => startShape(row, corrections, system)),
			entries: rows.map((row) => entryShape(row, covered, logged, system)).reverse(),
			stretches: stretches.map((one) => ({ ...one, from: iso(one.from), to: iso(one.to) })),
			units: unitsObject(system)
		};
	});
}
