import { z } from 'zod';
import { OUTCOMES, PROTECTIONS } from '../start';
import { provenanceSchema } from '../unit';
import { idSchema, instantSchema, unitsSchema } from './common';
import { siteSchema, unitSchema } from './site-unit';
import { clueSchema, startSchema } from './start';

/** Another start, as much of it as a link or a small mark needs. */
export const startLinkSchema = z.object({
	id: idSchema,
	startedAt: instantSchema,
	endedAt: instantSchema.nullable().optional(),
	outcome: z.enum(OUTCOMES).optional(),
	firstStart: z.boolean().optional()
});
export type StartLink = z.infer<typeof startLinkSchema>;

/** Which signal left the held starts' band first. GET /api/starts/{start}/first-mover */
export const firstMoverSchema = z
	.object({
		sentence: z.string(),
		/** why the order cannot be told; null when it can */
		cannotTell: z.string().nullable(),
		heldStarts: z.number().int(),
		fromSeconds: z.number().meta({ description: 'end of the start-up bypass' }),
		tripAtSeconds: z.number().nullable(),
		departures: z.array(
			z.object({
				signal: z.string(),
				label: z.string(),
				atSeconds: z.number(),
				errorSeconds: z.number(),
				direction: z.enum(['above', 'below'])
			})
		),
		/** median ± 3 MAD of the held starts, seconds from the start, in this answer's units */
		bands: z
			.array(
				z.object({
					signal: z.string(),
					quantity: z.string(),
					t: z.array(z.number()),
					low: z.array(z.number().nullable()),
					high: z.array(z.number().nullable())
				})
			)
			.optional(),
		units: unitsSchema.optional()
	})
	.meta({ id: 'FirstMover' });
export type FirstMover = z.infer<typeof firstMoverSchema>;

/** Distance to one protection, its limit, and what the unit's own starts teach of it. */
export const headroomSchema = z.object({
	protection: z.enum(PROTECTIONS),
	label: z.string(),
	quantity: z.string(),
	limitQuantity: z.string(),
	value: z.number().nullable(),
	absent: z.string().nullable(),
	limit: z.number().nullable(),
	provenance: provenanceSchema.nullable(),
	/** highest value at a trip, lowest survived; inverted: survived lower than it tripped */
	bracket: z
		.object({ tripped: z.number().nullable(), survived: z.number().nullable(), inverted: z.boolean() })
		.nullable()
		.optional()
});
export type Headroom = z.infer<typeof headroomSchema>;

/** Advice by trip kind, with the cautions that go with it. */
export const beforeYouResetSchema = z.object({
	/** false: no restart until the reason is found */
	restartAllowed: z.boolean(),
	advice: z.array(z.string()),
	cautions: z.array(z.string())
});

/** Old and new side by side after a new method version. */
const previousMethodSchema = z.object({
	methodVersion: z.string(),
	/** sentences on what was told otherwise: outcome, trip kind, stall */
	told: z.array(z.string()),
	figures: z.array(
		z.object({ key: z.string(), label: z.string(), before: z.number().nullable(), now: z.number().nullable() })
	)
});
export type PreviousMethodShown = z.infer<typeof previousMethodSchema>;

/** GET /api/starts/{start} */
export const startSheetSchema = z
	.object({
		start: startSchema,
		clues: z.array(clueSchema.extend({ suspect: z.string(), suspectName: z.string() })),
		unit: unitSchema,
		site: siteSchema,
		neighbours: z.object({ previous: startLinkSchema.nullable(), next: startLinkSchema.nullable() }),
		/** held starts nearest in their conditions first */
		held: z.array(startLinkSchema),
		/** every start of the same circuit on the same day of the site, this one too */
		sameDay: z.array(startLinkSchema).optional(),
		title: z.string().optional().meta({ description: 'the finding, as the sheet’s heading' }),
		tripLine: z.string().nullable().optional(),
		firstMover: firstMoverSchema.nullable().optional(),
		headroom: z.array(headroomSchema).optional(),
		stateSinceLastRow: z.object({ lastRowAt: instantSchema, sentence: z.string() }).nullable().optional(),
		beforeYouReset: beforeYouResetSchema.nullable().optional(),
		/** what the method’s previous version said of this start, where it differs; figures in this answer’s units */
		previousMethod: previousMethodSchema.nullable().optional(),
		/** the leading suspect’s deciding check */
		wouldDecide: z.string().nullable().optional(),
		coverage: z.number().nullable().optional(),
		period: z.object({ from: instantSchema, to: instantSchema }).nullable().optional(),
		units: unitsSchema
	})
	.meta({ id: 'StartSheet' });
export type StartSheet = z.infer<typeof startSheetSchema>;
