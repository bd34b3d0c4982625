import type { Contact, LimitKey, NamePlate, Provenance, Refrigerant, UnitNature } from '$lib/model/unit';
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
	uuid
} from 'drizzle-orm/pg-core';
import { instant } from './identity';
import { organisationId, ownRows } from './tenant';

/** Sites, units and their limits. */

export const sites = pgTable(
	'sites',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		name: text().notNull(),
		timeZone: text().notNull(),
		address: text(),
		/** m above sea level */
		altitude: doublePrecision(),
		contacts: jsonb().$type<Contact[]>().notNull().default([]),
		/** how to get in, keys, who to ask for */
		accessNotes: text(),
		/** who is told at once of a start-up trip that repeats */
		onCallId: uuid(),
		createdAt: instant().notNull().defaultNow()
	},
	(t) => [primaryKey({ columns: [t.organisationId, t.id] }), uniqueIndex().on(t.organisationId, t.name), ownRows()]
);

export const units = pgTable(
	'units',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		siteId: uuid().notNull(),
		tag: text().notNull(),
		refrigerant: text().$type<Refrigerant>().notNull(),
		circuits: integer().notNull(),
		nature: jsonb().$type<UnitNature>().notNull().default({}),
		namePlate: jsonb().$type<NamePlate>().notNull().default({}),
		/** a log is expected at least this often, h */
		deliveryHours: doublePrecision(),
		/** the last time a late log was mailed about */
		lateToldAt: instant(),
		/** raised with each change of nature, limits or logs: results older than it are stale */
		revision: integer().notNull().default(0),
		createdAt: instant().notNull().defaultNow()
	},
	(t) => [
		primaryKey({ columns: [t.organisationId, t.id] }),
		uniqueIndex().on(t.organisationId, t.siteId, t.tag),
		foreignKey({ columns: [t.organisationId, t.siteId], foreignColumns: [sites.organisationId, sites.id] }).onDelete(
			'cascade'
		),
		ownRows()
	]
);

/** Every value a limit ever had; a value that was taken back keeps its row with `retiredAt`. */
export const unitLimits = pgTable(
	'unit_limits',
	{
		organisationId: organisationId(),
		id: uuid().notNull().defaultRandom(),
		unitId: uuid().notNull(),
		key: text().$type<LimitKey>().notNull(),
		value: doublePrecision().notNull(),
		provenance: text().$type<Provenance>().notNull(),
		/** null: for all time */
		validFrom: instant(),
		note: text(),
		setBy: uuid(),
		setAt: instant().notNull().defaultNow(),
		retiredAt: instant()
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
