import { z } from 'zod';
import { idSchema, instantSchema, unitSystemSchema } from './common';
import { dayStripSchema } from './views';

/** Visits, their brief and their report. */

const words = (most: number) => z.string().trim().max(most);
const clock = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'is no clock, for example 05:40');

export const visitInputSchema = z
	.object({
		unitId: idSchema,
		caseId: idSchema.nullable().default(null),
		date: z.iso.date().meta({ description: 'the site’s date' }),
		beThereBy: clock
			.nullable()
			.optional()
			.meta({ description: 'the site’s clock; from the usual first start when left out' }),
		technicianId: idSchema.nullable().default(null),
		purpose: words(600).default(''),
		accessNotes: words(1000).default('')
	})
	.meta({ id: 'VisitInput' });
export type VisitInput = z.output<typeof visitInputSchema>;

export const visitPatchSchema = z
	.object({
		date: z.iso.date().optional(),
		beThereBy: clock.nullable().optional(),
		technicianId: idSchema.nullable().optional(),
		caseId: idSchema.nullable().optional(),
		purpose: words(600).optional(),
		accessNotes: words(1000).optional(),
		arrivedAt: instantSchema.nullable().optional(),
		leftAt: instantSchema.nullable().optional(),
		result: words(4000).optional()
	})
	.meta({ id: 'VisitPatch' });
export type VisitPatch = z.output<typeof visitPatchSchema>;

export const visitSchema = z
	.object({
		id: idSchema,
		unitId: idSchema,
		unitTag: z.string(),
		siteId: idSchema,
		siteName: z.string(),
		timeZone: z.string(),
		caseId: idSchema.nullable(),
		caseNumber: z.string().nullable(),
		date: z.string(),
		beThereBy: z.string().nullable(),
		technician: z.object({ id: idSchema, name: z.string() }).nullable(),
		arrivedAt: instantSchema.nullable(),
		leftAt: instantSchema.nullable(),
		purpose: z.string(),
		accessNotes: z.string(),
		result: z.string(),
		briefSentAt: instantSchema.nullable(),
		reportSentAt: instantSchema.nullable()
	})
	.meta({ id: 'Visit' });
export type Visit = z.infer<typeof visitSchema>;

/** One day on which a unit's first start is expected, for the plan of a week. */
export const planRowSchema = z.object({
	unitId: idSchema,
	unitTag: z.string(),
	siteName: z.string(),
	caseId: idSchema.nullable(),
	caseNumber: z.string().nullable(),
	k: z.number().int(),
	m: z.number().int(),
	trippedInARow: z.number().int(),
	beThereBy: z.object({ workingDay: z.string().nullable(), weekend: z.string().nullable() }),
	visits: z.array(
		z.object({ id: idSchema, date: z.string(), beThereBy: z.string().nullable(), who: z.string().nullable() })
	)
});
export type PlanRow = z.infer<typeof planRowSchema>;

const briefStartSchema = z.object({
	startId: idSchema,
	at: instantSchema,
	clock: z.string(),
	day: z.string(),
	outcome: z.string(),
	text: z.string(),
	/** seconds from the start; a null value is a break */
	traces: z.array(
		z.object({
			signal: z.string(),
			label: z.string(),
			family: z.string(),
			t: z.array(z.number()),
			v: z.array(z.number().nullable())
		})
	),
	tripAt: z.number().nullable(),
	cutout: z.number().nullable()
});
export type BriefStart = z.infer<typeof briefStartSchema>;

export const briefSchema = z
	.object({
		visit: visitSchema,
		circuit: z.string().nullable(),
		refrigerant: z.string(),
		safetyClass: z.string(),
		place: z.string(),
		beThereReason: z.string(),
		cautions: z.array(z.object({ text: z.string(), strong: z.boolean() })),
		story: z.array(z.object({ label: z.string(), text: z.string() })).max(5),
		days: z.array(dayStripSchema),
		starts: z.array(briefStartSchema),
		axis: z.object({ low: z.number(), high: z.number(), symbol: z.string(), toSeconds: z.number() }).nullable(),
		suspects: z.array(z.object({ name: z.string(), standing: z.string(), clue: z.string() })),
		checks: z.array(
			z.object({
				title: z.string(),
				tools: z.array(z.string()),
				cautions: z.array(z.string()),
				unitOff: z.boolean(),
				decides: z.string()
			})
		),
		logNext: z.array(z.string()),
		coverage: z.string(),
		methodVersion: z.string(),
		units: unitSystemSchema
	})
	.meta({ id: 'Brief' });
export type Brief = z.infer<typeof briefSchema>;

export const reportInputSchema = z
	.object({
		wrong: words(3000).min(1, 'say what was wrong'),
		found: words(3000).min(1, 'say how it was found'),
		done: words(3000).min(1, 'say what was done'),
		approve: z.boolean().default(false)
	})
	.meta({ id: 'ReportInput' });

export const reportSchema = z
	.object({
		visitId: idSchema,
		unitTag: z.string(),
		siteName: z.string(),
		date: z.string(),
		wrong: z.string(),
		found: z.string(),
		done: z.string(),
		proof: z.array(z.string()),
		checks: z.array(z.string()),
		approvedAt: instantSchema.nullable(),
		approvedBy: z.string().nullable(),
		sentAt: instantSchema.nullable(),
		sentTo: z.array(z.string()),
		mayGoTo: z.array(z.string()).meta({ description: 'addresses of the site’s contacts and client members' })
	})
	.meta({ id: 'Report' });
export type Report = z.infer<typeof reportSchema>;
