import { z } from 'zod';
import { TRIP_KINDS } from '../start';
import { idSchema, instantSchema, unitsSchema } from './common';
import { siteSchema } from './site-unit';

const changeLink = z.object({ id: idSchema, at: instantSchema, text: z.string() });

/** Whether the exposed starts since a change show that something changed. */
export const proofSchema = z
	.object({
		change: changeLink.nullable(),
		circuit: z.string(),
		state: z.enum(['changed', 'not-yet', 'too-little-before', 'no-exposed-start', 'no-change']),
		/** k′ and m′ after the opening trip is taken out and both are divided by d; plain counts beside them */
		before: z.object({
			k: z.number(),
			m: z.number(),
			d: z.number(),
			countedK: z.number(),
			countedM: z.number(),
			openingTrip: instantSchema.nullable()
		}),
		after: z.object({ t: z.number().int(), c: z.number().int(), days: z.number() }),
		e: z.number().nullable(),
		threshold: z.number(),
		cleanStillNeeded: z.number().int().nullable(),
		withinSeason: z.boolean().nullable(),
		excluded: z.array(z.object({ startId: idSchema.nullable(), startedAt: instantSchema, reason: z.string() })),
		leftOut: z.array(z.string()),
		otherChanges: z.array(changeLink),
		changes: z.array(changeLink).meta({ description: 'every change of the unit, to choose from' }),
		sentences: z.array(z.string()),
		units: unitsSchema
	})
	.meta({ id: 'Proof' });
export type ProofAnswer = z.infer<typeof proofSchema>;

const beThere = z.object({ minutes: z.number(), clock: z.string(), firstStarts: z.number().int() }).nullable();
export const repeatersSchema = z
	.object({
		repeaters: z.array(
			z.object({
				unitId: idSchema,
				tag: z.string(),
				circuit: z.string(),
				site: siteSchema,
				kind: z.enum(TRIP_KINDS).nullable(),
				chance: z.number(),
				tenth: z.number(),
				low: z.number(),
				high: z.number(),
				trips: z.number(),
				tries: z.number(),
				expectedFirstStarts: z.number(),
				score: z.number(),
				inARow: z.number().int(),
				coverage: z.number(),
				beThereBy: z.object({ 'working-day': beThere, weekend: beThere })
			})
		)
	})
	.meta({ id: 'Repeaters' });
export type Repeaters = z.infer<typeof repeatersSchema>;
