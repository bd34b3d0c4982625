import type { TripKind } from '$lib/model/start';
import type { SuspectKey } from '$lib/model/suspect';
import type { LimitKey } from '$lib/model/unit';
import {
	doublePrecision,
	foreignKey,
	index,
	integer,
	jsonb,
	pgTable,
	primaryKey,
	text,
	uniqueIndex,
	uuid,
	boolean,
	bigint
} from 'drizzle-orm/pg-core';
import { instant } from './identity';
import { units } from './plant';
import { organisationId, ownRows } from './tenant';

/** Cases, visits, field checks, changes, and what the office keeps about them. */

const onUnit = <T extends { organisationId: unknown; unitId: unknown }>(t: T) =>
	foreignKey({
		columns: [t.organisationId, t.unitId] as never,
		foreignColumns: [units.organisationId, units.id] as never
	}).onDelete('cascade');

export type TimelineEntry = { at: string; by: string | null; kind: string; text: string; link?: string };

export type VisitReport = {
	wrong: string;
	found: string;
	done: string;
	approvedAt: string | null;
	approvedBy: string | null;
	sentAt: string | null;
	sentTo: string[];
};

export const cases = pgTable(
	'cases',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		number: integer().notNull(),
		unitId: uuid().notNull(),
		circuit: text(),
		/** in the caller's words */
		complaint: text().notNull(),
		caller: text(),
		since: text(),
		howOften: text(),
		resets: text(),
		state: text()
			.$type<'open' | 'visit planned' | 'changed' | 'proved' | 'closed' | 'reopened'>()
			.notNull()
			.default('open'),
		assignedTo: uuid(),
		closeReason: text(),
		/** `call`, `repeater` or `start` */
		openedFrom: text().notNull().default('call'),
		startIds: jsonb().$type<string[]>().notNull().default([]),
		logIds: jsonb().$type<string[]>().notNull().default([]),
		/** addresses of side-by-side sheets */
		comparisons: jsonb().$type<string[]>().notNull().default([]),
		/** a matching start-up trip later than this reopens the case */
		watchFrom: instant(),
		timeline: jsonb().$type<TimelineEntry[]>().notNull().default([]),
		openedAt: instant().notNull().defaultNow(),
		openedBy: uuid(),
		closedAt: instant()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		uniqueIndex().on(t.organisationId, t.number),
		index().on(t.organisationId, t.unitId),
		onUnit(t),
		ownRows()
	]
);

export const visits = pgTable(
	'visits',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		unitId: uuid().notNull(),
		caseId: uuid(),
		/** the site's date */
		date: text().notNull(),
		beThereBy: text(),
		technicianId: uuid(),
		arrivedAt: instant(),
		leftAt: instant(),
		purpose: text(),
		accessNotes: text(),
		result: text(),
		/** the client's report, as a person wrote and approved it */
		report: jsonb().$type<VisitReport>(),
		briefSentAt: instant(),
		createdBy: uuid(),
		createdAt: instant().notNull().defaultNow()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		index().on(t.organisationId, t.unitId),
		onUnit(t),
		ownRows()
	]
);

export const checks = pgTable(
	'checks',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		/** the browser's own key, so that a check sent twice is stored once */
		clientKey: text(),
		unitId: uuid().notNull(),
		circuit: text(),
		caseId: uuid(),
		visitId: uuid(),
		kind: text().notNull(),
		readings: jsonb().$type<Record<string, unknown>>().notNull(),
		verdict: text(),
		indicative: boolean().notNull().default(false),
		indicativeReason: text(),
		note: text(),
		at: instant().notNull(),
		by: uuid().notNull(),
		byName: text().notNull(),
		signedAt: instant(),
		signedBy: uuid(),
		/** the suspect this check settles, when it is the decisive one */
		suspect: text(),
		createdAt: instant().notNull().defaultNow()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		uniqueIndex().on(t.organisationId, t.clientKey),
		index().on(t.organisationId, t.unitId),
		onUnit(t),
		ownRows()
	]
);

export const photos = pgTable(
	'photos',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		clientKey: text(),
		unitId: uuid().notNull(),
		checkId: uuid(),
		caption: text(),
		kind: text().notNull().default('camera'),
		originalKey: text().notNull(),
		viewKey: text().notNull(),
		width: integer().notNull(),
		height: integer().notNull(),
		bytes: bigint({ mode: 'number' }).notNull(),
		createdAt: instant().notNull().defaultNow()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		uniqueIndex().on(t.organisationId, t.clientKey),
		index().on(t.organisationId, t.checkId),
		onUnit(t),
		ownRows()
	]
);

export const changes = pgTable(
	'changes',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		clientKey: text(),
		unitId: uuid().notNull(),
		circuit: text(),
		caseId: uuid(),
		/** what was changed: oil, sensor, solenoid, setting, refrigerant, compressor, controller, other */
		kind: text().notNull(),
		text: text().notNull(),
		limit: text().$type<LimitKey>(),
		amount: doublePrecision(),
		amountUnit: text(),
		certifiedPerson: text(),
		/** suspects the change was meant to remove */
		aimedAt: jsonb().$type<SuspectKey[]>().notNull().default([]),
		/** splits the history: figures before it are no baseline after it */
		splits: boolean().notNull().default(false),
		at: instant().notNull(),
		by: uuid().notNull(),
		byName: text().notNull(),
		createdAt: instant().notNull().defaultNow()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		uniqueIndex().on(t.organisationId, t.clientKey),
		index().on(t.organisationId, t.unitId),
		onUnit(t),
		ownRows()
	]
);

/** Every message the product sends. */
export const mails = pgTable(
	'mails',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		kind: text().notNull(),
		/** a message with the same key is queued once */
		dedupeKey: text(),
		personId: uuid(),
		to: text().notNull(),
		subject: text().notNull(),
		text: text().notNull(),
		html: text(),
		attachments: jsonb().$type<{ name: string; type: string; key: string }[]>().notNull().default([]),
		state: text().$type<'queued' | 'sent' | 'failed'>().notNull().default('queued'),
		tries: integer().notNull().default(0),
		error: text(),
		createdAt: instant().notNull().defaultNow(),
		triedAt: instant(),
		sentAt: instant()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		uniqueIndex().on(t.organisationId, t.dedupeKey),
		index().on(t.organisationId, t.createdAt),
		ownRows()
	]
);

/** Who did what, before and after; append only. */
export const audit = pgTable(
	'audit',
	{
		organisationId: organisationId(),
		id: bigint({ mode: 'number' }).notNull().generatedAlwaysAsIdentity(),
		at: instant().notNull().defaultNow(),
		by: uuid(),
		byName: text(),
		action: text().notNull(),
		subject: text().notNull(),
		subjectId: text(),
		before: jsonb().$type<unknown>(),
		after: jsonb().$type<unknown>()
	},
	(t) => [primaryKey({ columns: [t.organisationId, t.id] }), ownRows()]
);

/** Answers to unsafe calls by their Idempotency-Key, kept for a day. */
export const idempotency = pgTable(
	'idempotency',
	{
		organisationId: organisationId(),
		key: text().notNull(),
		request: text().notNull(),
		status: integer().notNull(),
		body: jsonb().$type<unknown>(),
		location: text(),
		createdAt: instant().notNull().defaultNow()
	},
	(t) => [primaryKey({ columns: [t.organisationId, t.key] }), ownRows()]
);

/** Trade words that name a trip kind: a unit's own, or the whole organisation's. */
export const tripWords = pgTable(
	'trip_words',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		/** null: every unit of the organisation */
		unitId: uuid(),
		words: text().notNull(),
		kind: text().$type<TripKind>().notNull(),
		byName: text().notNull().default(''),
		createdAt: instant().notNull().defaultNow()
	},
	(t) => [primaryKey({ columns: [t.organisationId, t.id] }), onUnit(t), ownRows()]
);
