import { z } from 'zod';
import { idSchema, instantSchema, unitsSchema } from './common';

export const restResultSchema = z.enum(['passed', 'failed', 'not-testable', 'shown']);

/** One rest test over all nights: what it says and why. `shown` is a figure without a verdict. */
export const restTestSchema = z.object({
	key: z.string(),
	label: z.string(),
	result: restResultSchema,
	sentence: z.string(),
	value: z.number().nullable().optional(),
	quantity: z.string().optional(),
	rests: z.number().int().optional()
});
export type RestTest = z.infer<typeof restTestSchema>;

/** GET /api/units/{unit}/nights */
export const nightsSchema = z
	.object({
		title: z.string(),
		tests: z.array(restTestSchema),
		/** newest first */
		rests: z.array(
			z.object({
				from: instantSchema,
				to: instantSchema,
				/** the start that ended the rest */
				startId: idSchema.nullable(),
				results: z.array(
					z.object({
						key: z.string(),
						result: restResultSchema,
						value: z.number().nullable(),
						quantity: z.string(),
						why: z.string()
					})
				)
			})
		),
		/** what to log until tomorrow */
		tonight: z
			.object({
				sentence: z.string(),
				separates: z.array(z.string()),
				points: z.array(
					z.object({
						signal: z.string(),
						label: z.string(),
						spacingSeconds: z.number(),
						when: z.string(),
						why: z.string()
					})
				)
			})
			.nullable(),
		units: unitsSchema
	})
	.meta({ id: 'Nights' });
export type Nights = z.infer<typeof nightsSchema>;
