import type { UnitSystem } from '$lib/model/quantities';
import type { SeriesId } from '$lib/model/signals';
import type { NotedBody } from '$lib/model/noted';
import type { StartRecord, StartSource } from '$lib/model/start';
import type { Clue, SuspectKey, SuspectsResult } from '$lib/model/suspect';
import type { KeptFirstMover } from '$lib/model/first-mover';
import type { PreviousMethod } from '$lib/model/previous-method';
import type { Log } from '$lib/model/wire/log';
import {
	bigint,
	boolean,
	customType,
	doublePrecision,
	foreignKey,
	index,
	integer,
	jsonb,
	pgTable,
	primaryKey,
	real,
	text,
	uniqueIndex,
	uuid
} from 'drizzle-orm/pg-core';
import { instant } from './identity';
import { units } from './plant';
import { organisationId, ownRows } from './tenant';

/** Uploaded logs, their samples as blocks, and what was computed from them. */

export type StartExtras = {
	clues: Record<UnitSystem, (Clue & { suspect: SuspectKey })[]>;
	/** in stored units */
	firstMover: KeptFirstMover | null;
	/** what the method said before its present version, where it differs */
	previous?: PreviousMethod | undefined;
};

const bytes = customType<{ data: Uint8Array; driverData: Uint8Array }>({ dataType: () => 'bytea' });
const epochMs = () => bigint({ mode: 'number' });

export type StoredFile = { name: string; bytes: number; sha256: string; key: string };
export type LogOptions = { timeZone: string | null; mapping: 'auto' | 'ask'; choices: Record<string, string> };

export const logs = pgTable(
	'logs',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		unitId: uuid().notNull(),
		/** rises with each upload of the organisation: the later upload wins on reading */
		ordinal: bigint({ mode: 'number' }).generatedAlwaysAsIdentity(),
		name: text().notNull(),
		bytes: bigint({ mode: 'number' }).notNull(),
		sha256: text().notNull(),
		files: jsonb().$type<StoredFile[]>().notNull(),
		options: jsonb().$type<LogOptions>().notNull(),
		state: text().$type<Log['state']>().notNull().default('received'),
		progress: real().notNull().default(0),
		layout: jsonb().$type<Log['layout']>(),
		mapping: jsonb().$type<Log['mapping']>().notNull().default([]),
		/** what the reader saw: columns, previews, choices */
		inspection: jsonb().$type<unknown>(),
		rows: bigint({ mode: 'number' }).notNull().default(0),
		samples: bigint({ mode: 'number' }).notNull().default(0),
		firstAt: instant(),
		lastAt: instant(),
		quality: jsonb().$type<Log['quality']>(),
		problems: jsonb().$type<Log['problems']>().notNull().default([]),
		createdBy: uuid(),
		createdAt: instant().notNull().defaultNow(),
		readyAt: instant()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		uniqueIndex().on(t.organisationId, t.unitId, t.sha256),
		foreignKey({ columns: [t.organisationId, t.unitId], foreignColumns: [units.organisationId, units.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);

/** Instants of one stretch of one file, shared by the blocks of its signals. */
export const blockTimes = pgTable(
	'block_times',
	{
		organisationId: organisationId(),
		logId: uuid().notNull(),
		part: integer().notNull(),
		times: bytes().notNull()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.logId, t.part] }),
		foreignKey({ columns: [t.organisationId, t.logId], foreignColumns: [logs.organisationId, logs.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);

/** One signal's values over one stretch of one file. */
export const blocks = pgTable(
	'blocks',
	{
		organisationId: organisationId(),
		unitId: uuid().notNull(),
		circuit: text().notNull(),
		signal: text().$type<SeriesId>().notNull(),
		logId: uuid().notNull(),
		part: integer().notNull(),
		firstAt: epochMs().notNull(),
		lastAt: epochMs().notNull(),
		count: integer().notNull(),
		least: real(),
		most: real(),
		change: boolean().notNull(),
		increment: real(),
		measure: text(),
		values: bytes().notNull()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.unitId, t.circuit, t.signal, t.logId, t.part] }),
		index().on(t.organisationId, t.logId),
		foreignKey({ columns: [t.organisationId, t.logId], foreignColumns: [logs.organisationId, logs.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);

/** Words in time order (alarm, mode and limit columns): changes only. */
export const textBlocks = pgTable(
	'text_blocks',
	{
		organisationId: organisationId(),
		unitId: uuid().notNull(),
		circuit: text().notNull(),
		signal: text().notNull(),
		logId: uuid().notNull(),
		part: integer().notNull(),
		firstAt: epochMs().notNull(),
		lastAt: epochMs().notNull(),
		words: jsonb().$type<{ t: number[]; text: string[] }>().notNull()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.unitId, t.circuit, t.signal, t.logId, t.part] }),
		index().on(t.organisationId, t.logId),
		foreignKey({ columns: [t.organisationId, t.logId], foreignColumns: [logs.organisationId, logs.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);

/** Rows of alarm and event histories. */
export const events = pgTable(
	'events',
	{
		organisationId: organisationId(),
		logId: uuid().notNull(),
		line: integer().notNull(),
		unitId: uuid().notNull(),
		circuit: text().notNull(),
		at: epochMs().notNull(),
		text: text().notNull(),
		code: text(),
		severity: text().$type<'trip' | 'warning' | 'note' | 'unknown'>().notNull(),
		what: text().$type<'activation' | 'clearing' | 'acknowledgement'>().notNull()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.logId, t.line] }),
		index().on(t.organisationId, t.unitId, t.at),
		foreignKey({ columns: [t.organisationId, t.logId], foreignColumns: [logs.organisationId, logs.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);

/** A mapping a person confirmed, for the next log with the same header at the same site. */
export const rememberedMappings = pgTable(
	'remembered_mappings',
	{
		organisationId: organisationId(),
		siteId: uuid().notNull(),
		signature: text().notNull(),
		mapping: jsonb().$type<unknown>().notNull(),
		confirmedBy: uuid(),
		confirmedAt: instant().notNull().defaultNow()
	},
	(t) => [primaryKey({ columns: [t.organisationId, t.siteId, t.signature] }), ownRows()]
);

/** What a person typed of a unit's starts without a trend log: a start, or a reading of the counters. */
export const noted = pgTable(
	'noted',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		/** the page's own key: one that is sent twice is kept once */
		clientKey: text(),
		unitId: uuid().notNull(),
		circuit: text().notNull(),
		at: epochMs().notNull(),
		body: jsonb().$type<NotedBody>().notNull(),
		by: uuid().notNull(),
		byName: text().notNull(),
		createdAt: instant().notNull().defaultNow()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		uniqueIndex().on(t.organisationId, t.clientKey),
		index().on(t.organisationId, t.unitId, t.at),
		foreignKey({ columns: [t.organisationId, t.unitId], foreignColumns: [units.organisationId, units.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);

/** How an upload in parts is to be read, and the sender's own mark of its files. */
export type UploadKept = Pick<LogOptions, 'timeZone' | 'mapping'> & { name: string | null; fingerprint: string | null };

/** A log on its way in parts: what has arrived stays until it is whole, given up, or too old. */
export const uploads = pgTable(
	'uploads',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		unitId: uuid().notNull(),
		files: jsonb().$type<{ name: string; bytes: number }[]>().notNull(),
		options: jsonb().$type<UploadKept>().notNull(),
		/** the log it became */
		logId: uuid(),
		createdBy: uuid().notNull(),
		createdAt: instant().notNull().defaultNow(),
		/** after this nothing of it is kept; each part that arrives moves it on */
		expiresAt: instant().notNull()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		foreignKey({ columns: [t.organisationId, t.unitId], foreignColumns: [units.organisationId, units.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);

/** Bytes of an upload that are safe in the object store: stretches of one file that follow each other. */
export const uploadParts = pgTable(
	'upload_parts',
	{
		organisationId: organisationId(),
		uploadId: uuid().notNull(),
		file: integer().notNull(),
		/** the first byte's place in the file */
		begin: bigint({ mode: 'number' }).notNull(),
		bytes: bigint({ mode: 'number' }).notNull(),
		key: text().notNull()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.uploadId, t.file, t.begin] }),
		foreignKey({
			columns: [t.organisationId, t.uploadId],
			foreignColumns: [uploads.organisationId, uploads.id]
		}).onDelete('cascade'),
		ownRows()
	]
);

export const starts = pgTable(
	'starts',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		unitId: uuid().notNull(),
		circuit: text().notNull(),
		startedAt: epochMs().notNull(),
		endedAt: epochMs(),
		outcome: text().$type<StartRecord['outcome']>().notNull(),
		/** starts without a trend log stand beside the others and are read only where they are asked for */
		source: text().$type<StartSource>().notNull().default('log'),
		record: jsonb().$type<StartRecord>().notNull(),
		/** what the analysis says about this start beside its figures */
		extras: jsonb().$type<StartExtras>().notNull()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		uniqueIndex().on(t.organisationId, t.unitId, t.circuit, t.startedAt),
		foreignKey({ columns: [t.organisationId, t.unitId], foreignColumns: [units.organisationId, units.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);

/** A person's correction of a start; kept apart so that it survives recomputation. */
export const corrections = pgTable(
	'corrections',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		unitId: uuid().notNull(),
		circuit: text().notNull(),
		startedAt: epochMs().notNull(),
		correction: jsonb().$type<unknown>().notNull(),
		reason: text().notNull(),
		by: uuid().notNull(),
		byName: text().notNull(),
		at: instant().notNull().defaultNow()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		index().on(t.organisationId, t.unitId),
		foreignKey({ columns: [t.organisationId, t.unitId], foreignColumns: [units.organisationId, units.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);

/** What the last analysis of a circuit said beside its starts. */
export const circuitResults = pgTable(
	'circuit_results',
	{
		organisationId: organisationId(),
		unitId: uuid().notNull(),
		circuit: text().notNull(),
		revision: integer().notNull(),
		covered: jsonb().$type<[number, number][]>().notNull(),
		/** in both systems of units, because the sentences carry figures */
		suspects: jsonb().$type<Record<UnitSystem, SuspectsResult>>().notNull(),
		smallestEventSeconds: doublePrecision(),
		alarmShift: doublePrecision(),
		notes: jsonb().$type<string[]>().notNull(),
		methodVersion: text().notNull(),
		computedAt: instant().notNull().defaultNow()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.unitId, t.circuit] }),
		foreignKey({ columns: [t.organisationId, t.unitId], foreignColumns: [units.organisationId, units.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);
