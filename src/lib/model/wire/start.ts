import { z } from 'zod';
import { ABSENT_REASONS, FIGURE_KEYS, OUTCOMES, START_SOURCES, TRIP_KINDS } from '../start';
import { idSchema, instantSchema, unitsSchema } from './common';

const figureKey = z.enum(FIGURE_KEYS as [string, ...string[]]);
export const stallSchema = z.object({
	from: instantSchema,
	to: instantSchema,
	levelPct: z.number(),
	demandPct: z.number().nullable(),
	verdict: z.enum(['stall', 'limited', 'cannot-tell']),
	limiting: z.string().nullable()
});
export const tripSchema = z.object({
	at: instantSchema,
	kind: z.enum(TRIP_KINDS),
	basis: z.enum(['recorded', 'inferred']),
	text: z.string().nullable(),
	sureness: z.number(),
	reason: z.string()
});
/** One start as the API gives it. */
export const startSchema = z
	.object({
		id: idSchema,
		unitId: idSchema,
		circuit: z.string(),
		source: z.enum(START_SOURCES).meta({
			description: 'without a trend log: typed, or of an alarm list, whose trip instant stands where no start is known'
		}),
		startedAt: instantSchema,
		endedAt: instantSchema.nullable(),
		uncertaintySeconds: z.number(),
		endUncertaintySeconds: z.number(),
		spacingSeconds: z.number(),
		outcome: z.enum(OUTCOMES),
		outcomeReason: z.string(),
		startupTrip: z.boolean(),
		firstStart: z.boolean(),
		restSeconds: z.number().nullable(),
		restAtLeast: z.boolean(),
		layUp: z.boolean(),
		episode: z.string().nullable(),
		tryNumber: z.number().int(),
		attended: z.boolean(),
		othersRunning: z.number().int(),
		trip: tripSchema.nullable(),
		stall: stallSchema.nullable(),
		settled: z.object({ from: instantSchema, to: instantSchema }).nullable(),
		holes: z.array(z.object({ from: instantSchema, to: instantSchema })),
		runningFrom: z.string(),
		notes: z.array(z.string()),
		figures: z.record(figureKey, z.number().nullable()),
		absent: z.record(z.string(), z.string()).meta({ description: 'why a figure is null, as a sentence' }),
		absentReasons: z.record(z.string(), z.enum(ABSENT_REASONS)),
		marks: z.record(z.string(), z.enum(['early', 'coarse'])),
		corrected: z.object({ reason: z.string(), by: z.string(), at: instantSchema }).nullable(),
		methodVersion: z.string(),
		units: unitsSchema
	})
	.meta({ id: 'Start' });
export type Start = z.infer<typeof startSchema>;

export const startCorrectionSchema = z
	.object({
		outcome: z.enum(OUTCOMES).optional(),
		tripKind: z.enum(TRIP_KINDS).optional(),
		attended: z.boolean().optional(),
		startedAt: instantSchema.optional(),
		reason: z.string().trim().min(3).max(500)
	})
	.meta({ id: 'StartCorrection' });

export const clueSchema = z.object({
	key: z.string(),
	direction: z.enum(['for', 'against', 'missing']),
	weight: z.number(),
	sentence: z.string(),
	figures: z.record(z.string(), z.number()),
	starts: z.array(z.string()),
	show: z.object({ signals: z.array(z.string()), from: z.number(), to: z.number() }).optional()
});
const checkToDoSchema = z.object({
	key: z.string(),
	title: z.string(),
	tools: z.array(z.string()),
	cautions: z.array(z.string()),
	unitOff: z.boolean()
});
/** A field check that would tell the leading suspects apart: which it decides, by name, and what it parts. */
const nextCheckSchema = checkToDoSchema.extend({ decides: z.array(z.string()), sentence: z.string() });
export type NextCheck = z.infer<typeof nextCheckSchema>;
export const suspectSchema = z
	.object({
		key: z.string(),
		name: z.string(),
		rank: z.number().int(),
		standing: z.enum(['points-to', 'fits', 'speaks-against', 'cannot-tell']),
		clues: z.array(clueSchema),
		decisiveCheck: checkToDoSchema
	})
	.meta({ id: 'Suspect' });
export type Suspect = z.infer<typeof suspectSchema>;
export const verdictSchema = z.enum(['fault-pattern', 'no-fault-pattern', 'cannot-tell']);
const circuitSuspects = z.object({ circuit: z.string(), verdict: verdictSchema, suspects: z.array(suspectSchema) });
export const suspectsSchema = z
	.object({
		verdict: verdictSchema,
		suspects: z.array(suspectSchema),
		missingSignals: z.array(z.string()),
		/** field checks to do next, those that separate most first; empty on a sound unit */
		nextChecks: z.array(nextCheckSchema),
		circuits: z.array(circuitSuspects),
		units: unitsSchema
	})
	.meta({ id: 'Suspects' });
export type Suspects = z.infer<typeof suspectsSchema>;
