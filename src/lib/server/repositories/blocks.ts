import type { Tx } from '$lib/server/db/client';
import { blockTimes, blocks, events, logs, textBlocks } from '$lib/server/db/schema/logs';
import { and, asc, eq, gte, inArray, lte, ne, sql } from 'drizzle-orm';

/** Samples as blocks (see the schema): written by reading, read by analysis and traces. */

export type NewBlock = typeof blocks.$inferInsert;
export type NewTimes = typeof blockTimes.$inferInsert;
export type NewWords = typeof textBlocks.$inferInsert;
export type NewEvent = typeof events.$inferInsert;

/** Stores what reading has buffered. */
export async function insertBlocks(
	tx: Tx,
	batch: { times: NewTimes[]; blocks: NewBlock[]; words: NewWords[]; events: NewEvent[] }
): Promise<void> {
	if (batch.times.length > 0) await tx.insert(blockTimes).values(batch.times);
	if (batch.blocks.length > 0) await tx.insert(blocks).values(batch.blocks);
	if (batch.words.length > 0) await tx.insert(textBlocks).values(batch.words);
	if (batch.events.length > 0) await tx.insert(events).values(batch.events);
}

export type Window = { from: number; to: number };
const READABLE = ['analysing', 'ready'] as const;

/** Blocks of a unit's circuits and signals that touch a window, in order of upload and time; of finished logs only. */
export function findBlocks(
	tx: Tx,
	unitId: string,
	circuits: readonly string[],
	window: Window | null,
	signals: readonly string[] | null
) {
	return tx
		.select({
			circuit: blocks.circuit,
			signal: blocks.signal,
			logId: blocks.logId,
			ordinal: logs.ordinal,
			part: blocks.part,
			firstAt: blocks.firstAt,
			lastAt: blocks.lastAt,
			count: blocks.count,
			change: blocks.change,
			increment: blocks.increment,
			measure: blocks.measure,
			values: blocks.values
		})
		.from(blocks)
		.innerJoin(logs, and(eq(logs.organisationId, blocks.organisationId), eq(logs.id, blocks.logId)))
		.where(
			and(
				eq(blocks.unitId, unitId),
				inArray(blocks.circuit, [...circuits]),
				inArray(logs.state, [...READABLE]),
				signals ? inArray(blocks.signal, signals as (typeof blocks.$inferSelect)['signal'][]) : undefined,
				window ? and(lte(blocks.firstAt, window.to), gte(blocks.lastAt, window.from)) : undefined
			)
		)
		.orderBy(asc(logs.ordinal), asc(blocks.part));
}
export type FoundBlock = Awaited<ReturnType<typeof findBlocks>>[number];

/** Has another log of the unit samples in a window of time? */
export async function overlapsAnother(tx: Tx, unitId: string, logId: string, window: Window): Promise<boolean> {
	const [row] = await tx
		.select({ logId: blocks.logId })
		.from(blocks)
		.where(
			and(
				eq(blocks.unitId, unitId),
				ne(blocks.logId, logId),
				lte(blocks.firstAt, window.to),
				gte(blocks.lastAt, window.from)
			)
		)
		.limit(1);
	return row !== undefined;
}

/** The instants of some parts of some logs. */
export async function findTimes(tx: Tx, parts: readonly { logId: string; part: number }[]) {
	if (parts.length === 0) return [];
	const byLog = new Map<string, Set<number>>();
	for (const { logId, part } of parts) {
		const set = byLog.get(logId) ?? new Set<number>();
		byLog.set(logId, set.add(part));
	}
	const found = [];
	for (const [logId, set] of byLog) {
		const rows = await tx
			.select()
			.from(blockTimes)
			.where(and(eq(blockTimes.logId, logId), inArray(blockTimes.part, [...set])));
		found.push(...rows);
	}
	return found;
}

export function findWords(tx: Tx, unitId: string, circuits: readonly string[], window: Window | null) {
	return tx
		.select({
			circuit: textBlocks.circuit,
			signal: textBlocks.signal,
			ordinal: logs.ordinal,
			part: textBlocks.part,
			words: textBlocks.words
		})
		.from(textBlocks)
		.innerJoin(logs, and(eq(logs.organisationId, textBlocks.organisationId), eq(logs.id, textBlocks.logId)))
		.where(
			and(
				eq(textBlocks.unitId, unitId),
				inArray(textBlocks.circuit, [...circuits]),
				inArray(logs.state, [...READABLE]),
				window ? and(lte(textBlocks.firstAt, window.to), gte(textBlocks.lastAt, window.from)) : undefined
			)
		)
		.orderBy(asc(logs.ordinal), asc(textBlocks.part));
}

export function findEvents(tx: Tx, unitId: string, window: Window | null) {
	return tx
		.select({ event: events, ordinal: logs.ordinal })
		.from(events)
		.innerJoin(logs, and(eq(logs.organisationId, events.organisationId), eq(logs.id, events.logId)))
		.where(
			and(
				eq(events.unitId, unitId),
				inArray(logs.state, [...READABLE]),
				window ? and(gte(events.at, window.from), lte(events.at, window.to)) : undefined
			)
		)
		.orderBy(asc(events.at), asc(logs.ordinal));
}

/** First and last instant with samples of a unit, of finished logs; null when there are none. */
export async function sampleSpan(tx: Tx, unitId: string): Promise<Window | null> {
	const [row] = await tx
		.select({ from: sql<string | null>`min(${blocks.firstAt})`, to: sql<string | null>`max(${blocks.lastAt})` })
		.from(blocks)
		.innerJoin(logs, and(eq(logs.organisationId, blocks.organisationId), eq(logs.id, blocks.logId)))
		.where(and(eq(blocks.unitId, unitId), inArray(logs.state, [...READABLE])));
	return row?.from && row.to ? { from: Number(row.from), to: Number(row.to) } : null;
}

/** Which signals of which circuits a unit has samples of. */
export function listSignals(tx: Tx, unitId: string) {
	return tx
		.selectDistinct({ circuit: blocks.circuit, signal: blocks.signal })
		.from(blocks)
		.where(eq(blocks.unitId, unitId));
}
