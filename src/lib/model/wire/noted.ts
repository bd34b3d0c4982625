import { z } from 'zod';
import { READING_MOMENTS } from '../noted';
import { SIGNAL_KEYS } from '../signals';
import { TRIP_KINDS } from '../start';
import { idSchema, instantSchema, unitsSchema } from './common';
import { startSchema } from './start';

/** The record of starts without a trend log, as it is typed and answered. One schema for page and API. */

const text = (most: number) => z.string().trim().max(most).default('');
const instant = instantSchema.nullable().default(null);
const common = {
	clientKey: z.string().trim().min(8).max(80).optional().meta({ description: 'your own key: sent twice is kept once' }),
	circuit: z.enum(['1', '2', '3', '4']).default('1'),
	note: text(1000)
};
export const notedReadingSchema = z.object({
	signal: z.enum(SIGNAL_KEYS as [string, ...string[]]),
	value: z.number().meta({ description: 'stored unit of the signal: °C, kPa absolute, L/s, %, A' }),
	moment: z.enum(READING_MOMENTS)
});
const startInput = z
	.object({
		...common,
		kind: z.literal('start'),
		startedAt: instant,
		endedAt: instant,
		outcome: z.enum(['tripped', 'held', 'called-off', 'unclear']),
		tripKind: z.enum(TRIP_KINDS).nullable().default(null),
		text: text(300).meta({ description: 'what the controller said; the trip-word table reads it' }),
		attended: z.boolean().default(false),
		readings: z.array(notedReadingSchema).max(24).default([])
	})
	.refine(({ startedAt, endedAt }) => startedAt !== null || endedAt !== null, {
		message: 'say when it started, or when it stopped',
		path: ['startedAt']
	})
	.refine(
		({ startedAt, endedAt }) => startedAt === null || endedAt === null || Date.parse(startedAt) <= Date.parse(endedAt),
		{
			message: 'it stopped before it started',
			path: ['endedAt']
		}
	);
const countersInput = z
	.object({
		...common,
		kind: z.literal('counters'),
		at: instantSchema,
		starts: z.number().int().min(0).max(10_000_000).nullable().default(null),
		runHours: z.number().min(0).max(10_000_000).nullable().default(null)
	})
	.refine(({ starts, runHours }) => starts !== null || runHours !== null, {
		message: 'give the starts, the hours, or both',
		path: ['starts']
	});
export const notedInputSchema = z.discriminatedUnion('kind', [startInput, countersInput]).meta({ id: 'NotedInput' });
export type NotedInput = z.output<typeof notedInputSchema>;
export type NotedInputSent = z.input<typeof notedInputSchema>;

/** One typed entry. Of a start: whether it stands, or a trend log covers its time and tells instead. */
export const notedEntrySchema = z
	.object({
		id: idSchema,
		unitId: idSchema,
		kind: z.enum(['start', 'counters']),
		circuit: z.string(),
		at: instantSchema,
		startedAt: instantSchema.nullable(),
		endedAt: instantSchema.nullable(),
		outcome: z.string().nullable(),
		text: z.string(),
		note: z.string(),
		starts: z.number().nullable(),
		runHours: z.number().nullable(),
		readings: z.array(
			z.object({ signal: z.string(), value: z.number(), unit: z.string(), moment: z.enum(READING_MOMENTS) })
		),
		covered: z.boolean().meta({ description: 'a trend log covers this time, so the log tells and not the entry' }),
		loggedStart: idSchema.nullable().meta({ description: 'the log’s start within 10 min of it' }),
		by: z.string(),
		createdAt: instantSchema
	})
	.meta({ id: 'NotedEntry' });
export type NotedEntry = z.infer<typeof notedEntrySchema>;

export const counterStretchSchema = z.object({
	circuit: z.string(),
	from: instantSchema,
	to: instantSchema,
	starts: z.number().nullable(),
	runSeconds: z.number().nullable(),
	meanRunSeconds: z.number().nullable(),
	shortAtLeast: z.number().nullable().meta({ description: 'at least so many ended inside the start-up window' }),
	wentBack: z.boolean(),
	basis: z.enum(['typed', 'logged'])
});
/** GET /api/units/{unit}/record */
export const recordSchema = z
	.object({
		starts: z.array(startSchema).meta({ description: 'starts that no trend log covers, oldest first' }),
		entries: z.array(notedEntrySchema).meta({ description: 'what was typed, newest first' }),
		stretches: z.array(counterStretchSchema),
		units: unitsSchema
	})
	.meta({ id: 'StartRecord' });
export type UnitRecord = z.infer<typeof recordSchema>;
