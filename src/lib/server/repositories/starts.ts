import { previousOf } from '$lib/model/previous-method';
import type { StartCorrection, StartRecord, StartSource } from '$lib/model/start';
import type { Tx } from '$lib/server/db/client';
import { circuitResults, corrections, starts } from '$lib/server/db/schema/logs';
import { and, asc, eq, gte, inArray, lte, ne } from 'drizzle-orm';

/** Starts, their corrections and what was computed per circuit. */

export type StartRow = typeof starts.$inferSelect;
export type CorrectionRow = Omit<typeof corrections.$inferSelect, 'correction'> & { correction: StartCorrection };
export type CircuitResultRow = typeof circuitResults.$inferSelect;

export type StartFilter = {
	from?: number;
	to?: number;
	outcome?: string;
	circuit?: string;
	/** those of trend logs unless said: what nobody logged has no place in rates, proof or comparisons */
	source?: 'log' | 'noted' | 'all';
};

function fromSource(source: StartFilter['source'] = 'log') {
	if (source === 'all') return undefined;
	return source === 'log' ? eq(starts.source, 'log') : ne(starts.source, 'log' satisfies StartSource);
}

/** The starts of some units, oldest first. */
export function listStarts(tx: Tx, unitIds: readonly string[], filter: StartFilter = {}): Promise<StartRow[]> {
	if (unitIds.length === 0) return Promise.resolve([]);
	return tx
		.select()
		.from(starts)
		.where(
			and(
				inArray(starts.unitId, [...unitIds]),
				fromSource(filter.source),
				filter.from === undefined ? undefined : gte(starts.startedAt, filter.from),
				filter.to === undefined ? undefined : lte(starts.startedAt, filter.to),
				filter.outcome ? eq(starts.outcome, filter.outcome as StartRow['outcome']) : undefined,
				filter.circuit ? eq(starts.circuit, filter.circuit) : undefined
			)
		)
		.orderBy(asc(starts.startedAt), asc(starts.circuit));
}

export async function findStart(tx: Tx, id: string): Promise<StartRow | null> {
	const [row] = await tx.select().from(starts).where(eq(starts.id, id));
	return row ?? null;
}

const SAME_START_MS = 120_000;

/** Ids that starts had before, by circuit and nearest start within two minutes: a recomputed start keeps its address. */
function keepIds(
	before: readonly { id: string; circuit: string; startedAt: number }[],
	records: readonly StartRecord[]
): (string | undefined)[] {
	const free = new Set(before);
	return records.map((record) => {
		let best: { id: string; distance: number; row: (typeof before)[number] } | undefined;
		for (const row of free) {
			const distance = Math.abs(row.startedAt - record.startedAt);
			if (row.circuit === record.circuit && distance <= SAME_START_MS && distance < (best?.distance ?? Infinity)) {
				best = { id: row.id, distance, row };
			}
		}
		if (best) free.delete(best.row);
		return best?.id;
	});
}

/**
 * A start's extras with what an earlier method version said of it: of the row it replaces, or (recomputed with the same
 * version, after another limit or log) what that row had kept.
 */
function withPrevious(
	row: { record: StartRecord; extras: StartRow['extras'] } | undefined,
	{ record, extras }: { record: StartRecord; extras: StartRow['extras'] }
): StartRow['extras'] {
	if (!row) return extras;
	const kept = row.record.methodVersion === record.methodVersion ? row.extras.previous : previousOf(row.record, record);
	return kept ? { ...extras, previous: kept } : extras;
}

/** Replaces a unit's starts; those that stay keep their ids, and what an earlier method version said of them. */
export async function replaceStarts(
	tx: Tx,
	organisationId: string,
	unitId: string,
	made: readonly { record: StartRecord; extras: StartRow['extras'] }[]
): Promise<void> {
	const before = await tx
		.select({
			id: starts.id,
			circuit: starts.circuit,
			startedAt: starts.startedAt,
			record: starts.record,
			extras: starts.extras
		})
		.from(starts)
		.where(eq(starts.unitId, unitId));
	const ids = keepIds(
		before,
		made.map(({ record }) => record)
	);
	const rowOf = new Map(before.map((row) => [row.id, row]));
	await tx.delete(starts).where(eq(starts.unitId, unitId));
	const rows = made.map(({ record, extras }, i) => ({
		organisationId,
		...(ids[i] ? { id: ids[i] } : {}),
		unitId,
		circuit: record.circuit,
		startedAt: record.startedAt,
		endedAt: record.endedAt,
		outcome: record.outcome,
		source: record.source ?? 'log',
		record,
		extras: withPrevious(rowOf.get(ids[i] ?? ''), { record, extras })
	}));
	for (let i = 0; i < rows.length; i += 200) await tx.insert(starts).values(rows.slice(i, i + 200));
}

export async function listCorrections(tx: Tx, unitId: string): Promise<CorrectionRow[]> {
	const rows = await tx.select().from(corrections).where(eq(corrections.unitId, unitId)).orderBy(asc(corrections.at));
	return rows as CorrectionRow[];
}

export async function insertCorrection(tx: Tx, row: Omit<CorrectionRow, 'id' | 'at'>): Promise<void> {
	await tx.insert(corrections).values(row);
}

export async function saveCircuitResult(tx: Tx, row: typeof circuitResults.$inferInsert): Promise<void> {
	const { organisationId: _o, unitId: _u, circuit: _c, ...set } = row;
	await tx
		.insert(circuitResults)
		.values(row)
		.onConflictDoUpdate({
			target: [circuitResults.organisationId, circuitResults.unitId, circuitResults.circuit],
			set: { ...set, computedAt: new Date() }
		});
}

/** Units with results of another method version than the given one. */
export async function staleUnits(tx: Tx, methodVersion: string): Promise<string[]> {
	const rows = await tx
		.selectDistinct({ unitId: circuitResults.unitId })
		.from(circuitResults)
		.where(ne(circuitResults.methodVersion, methodVersion));
	return rows.map((row) => row.unitId);
}

export function listCircuitResults(tx: Tx, unitIds: readonly string[]): Promise<CircuitResultRow[]> {
	if (unitIds.length === 0) return Promise.resolve([]);
	return tx
		.select()
		.from(circuitResults)
		.where(inArray(circuitResults.unitId, [...unitIds]))
		.orderBy(asc(circuitResults.circuit));
}
