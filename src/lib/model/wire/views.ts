import { z } from 'zod';
import { OUTCOMES } from '../start';
import { idSchema, instantSchema, unitsSchema } from './common';
import { siteSchema, unitSchema } from './site-unit';
import { verdictSchema } from './start';

/** A run as a stroke on a day's clock: minutes of the site's day, 0…1440 (25-hour days count on). */
export const strokeSchema = z.object({
	startId: idSchema,
	circuit: z.string(),
	from: z.number(),
	to: z.number(),
	/** the stroke goes on over midnight */
	beganBefore: z.boolean(),
	goesOn: z.boolean(),
	outcome: z.enum(OUTCOMES),
	startupTrip: z.boolean(),
	attended: z.boolean(),
	/** known without a trend log: typed, or from an alarm list */
	noted: z.boolean().optional()
});
export const dayStripSchema = z.object({
	/** the site's date, YYYY-MM-DD */
	date: z.string(),
	strokes: z.array(strokeSchema),
	/** stretches with a log, minutes of the day */
	logged: z.array(z.tuple([z.number(), z.number()]))
});
export type DayStrip = z.infer<typeof dayStripSchema>;
export type Stroke = z.infer<typeof strokeSchema>;

export const pinSchema = z.object({
	kind: z.enum(['change', 'visit', 'case']),
	id: idSchema,
	at: instantSchema,
	date: z.string(),
	clock: z.string(),
	text: z.string()
});
export type Pin = z.infer<typeof pinSchema>;

/** GET /api/units/{unit}/days */
export const daysSchema = z
	.object({
		days: z.array(
			dayStripSchema.extend({
				first: z.enum(OUTCOMES).nullable(),
				starts: z.number().int(),
				trips: z.number().int(),
				condWaterInAtStart: z.number().nullable(),
				minEvapSaturation: z.number().nullable(),
				belowCutout: z.boolean()
			})
		),
		pins: z.array(pinSchema),
		/** the stretch of clock that most start-up trips fall in, minutes of the day, and the counts behind it */
		cluster: z
			.object({
				from: z.number(),
				to: z.number(),
				inside: z.number(),
				trips: z.number(),
				otherTrips: z.number(),
				others: z.number()
			})
			.nullable(),
		title: z.string(),
		from: z.string(),
		to: z.string(),
		coverage: z.number(),
		timeZone: z.string(),
		units: unitsSchema
	})
	.meta({ id: 'Days' });
export type Days = z.infer<typeof daysSchema>;

/** One row of the Units page. GET /api/units?view=summary → {units: [UnitSummary]} worst repeater first */
export const unitSummarySchema = z
	.object({
		unit: unitSchema,
		site: siteSchema,
		starts: z.number().int(),
		startupTrips: z.number().int(),
		/** starts known without a trend log, in no other count of this row */
		noted: z.number().int().optional(),
		/** m eligible first tries, k of them start-up trips, with Wilson's 95 % interval */
		firstTries: z.object({ m: z.number(), k: z.number(), low: z.number().nullable(), high: z.number().nullable() }),
		lastFirst: z.array(z.enum(OUTCOMES)).meta({ description: 'the last ten first starts, oldest first' }),
		trippedInARow: z.number().int(),
		verdict: verdictSchema.nullable(),
		leading: z.object({ key: z.string(), name: z.string(), standing: z.string() }).nullable(),
		/** suspects may be withheld from a client until a technician has signed */
		withheld: z.boolean(),
		coverage: z.number().nullable(),
		strip: z.array(dayStripSchema),
		openCase: z.object({ id: idSchema, number: z.string(), openedAt: instantSchema, state: z.string() }).nullable(),
		nextVisit: z
			.object({ id: idSchema, date: z.string(), beThereBy: z.string().nullable(), who: z.string().nullable() })
			.nullable(),
		logs: z.object({ ready: z.number(), waiting: z.number(), refused: z.number(), reading: z.number() })
	})
	.meta({ id: 'UnitSummary' });
export type UnitSummary = z.infer<typeof unitSummarySchema>;

/** Traces as JSON: `t` in ms UTC; a null value is a break (a gap or no reading), never bridged. */
export const tracesSchema = z
	.object({
		from: instantSchema,
		to: instantSchema,
		spacingSeconds: z.number().nullable(),
		traces: z.array(
			z.object({
				signal: z.string(),
				label: z.string(),
				quantity: z.string(),
				measure: z.string(),
				logging: z.enum(['interval', 'change']),
				derived: z.boolean(),
				t: z.array(z.number()),
				v: z.array(z.number().nullable())
			})
		),
		gaps: z.array(z.object({ from: instantSchema, to: instantSchema })),
		marks: z.array(
			z.object({
				kind: z.enum(['start', 'trip', 'stop', 'alarm', 'change', 'note']),
				at: instantSchema,
				text: z.string()
			})
		),
		missing: z.array(z.string()),
		units: unitsSchema
	})
	.meta({ id: 'Traces' });
export type Traces = z.infer<typeof tracesSchema>;
