import type { Preferences, Role } from '$lib/model/people';
import {
	bigint,
	boolean,
	index,
	integer,
	jsonb,
	pgTable,
	primaryKey,
	text,
	timestamp,
	uniqueIndex,
	uuid
} from 'drizzle-orm/pg-core';

/** Who may come in. These tables are read before the organisation is known, so they carry no row-level security. */

export const instant = () => timestamp({ withTimezone: true, mode: 'date', precision: 3 });
const created = () => instant().notNull().defaultNow();

export const organisations = pgTable('organisations', {
	id: uuid().primaryKey().defaultRandom(),
	name: text().notNull(),
	settings: jsonb().$type<Record<string, unknown>>().notNull().default({}),
	createdAt: created()
});

export const people = pgTable('people', {
	id: uuid().primaryKey().defaultRandom(),
	/** lower case */
	email: text().notNull().unique(),
	name: text().notNull(),
	passwordHash: text(),
	/** base32, set while two-step sign-in is on */
	totpSecret: text(),
	totpConfirmed: boolean().notNull().default(false),
	/** last time step used, so that a code works once */
	totpLastStep: bigint({ mode: 'number' }),
	/** issuer and subject at the identity provider that this person signed in through */
	oidcSubject: text().unique(),
	recoveryHashes: jsonb().$type<string[]>().notNull().default([]),
	preferences: jsonb().$type<Preferences>().notNull().default({ units: 'ip', paper: 'system' }),
	/** what mail a person wants: kind → wanted */
	mailChoices: jsonb().$type<Record<string, boolean>>().notNull().default({}),
	createdAt: created()
});

export const members = pgTable(
	'members',
	{
		organisationId: uuid()
			.notNull()
			.references(() => organisations.id, { onDelete: 'cascade' }),
		personId: uuid()
			.notNull()
			.references(() => people.id),
		role: text().$type<Role>().notNull(),
		/** null: every site */
		siteIds: jsonb().$type<string[] | null>(),
		leftAt: instant(),
		createdAt: created()
	},
	(t) => [primaryKey({ columns: [t.organisationId, t.personId] }), index().on(t.personId)]
);

export const sessions = pgTable(
	'sessions',
	{
		/** SHA-256 of the token; the token itself is only in the cookie */
		tokenHash: text().primaryKey(),
		personId: uuid()
			.notNull()
			.references(() => people.id, { onDelete: 'cascade' }),
		organisationId: uuid()
			.notNull()
			.references(() => organisations.id, { onDelete: 'cascade' }),
		userAgent: text(),
		createdAt: created(),
		seenAt: created(),
		expiresAt: instant().notNull()
	},
	(t) => [index().on(t.personId)]
);

export const apiKeys = pgTable(
	'api_keys',
	{
		id: uuid().primaryKey().defaultRandom(),
		organisationId: uuid()
			.notNull()
			.references(() => organisations.id, { onDelete: 'cascade' }),
		personId: uuid()
			.notNull()
			.references(() => people.id),
		name: text().notNull(),
		keyHash: text().notNull(),
		/** first characters, to tell keys apart on the page */
		prefix: text().notNull(),
		role: text().$type<Role>().notNull(),
		scopes: jsonb().$type<string[]>().notNull(),
		siteIds: jsonb().$type<string[] | null>(),
		expiresAt: instant(),
		usedAt: instant(),
		revokedAt: instant(),
		createdAt: created()
	},
	(t) => [uniqueIndex().on(t.keyHash), index().on(t.organisationId)]
);

/** Invitations, password resets and e-mail changes: one table of single-use tokens. */
export const tokens = pgTable('tokens', {
	tokenHash: text().primaryKey(),
	kind: text().$type<'invitation' | 'reset' | 'email' | 'first-owner' | 'unsubscribe'>().notNull(),
	organisationId: uuid().references(() => organisations.id, { onDelete: 'cascade' }),
	personId: uuid().references(() => people.id, { onDelete: 'cascade' }),
	data: jsonb().$type<Record<string, unknown>>().notNull().default({}),
	expiresAt: instant().notNull(),
	usedAt: instant(),
	createdAt: created()
});

/** Counters of rate-limiter-flexible. */
export const rateLimits = pgTable('rate_limits', {
	key: text().primaryKey(),
	points: integer().notNull().default(0),
	expire: bigint({ mode: 'number' })
});
