import { z } from 'zod';
import { unitsSchema } from './common';

/** Weekly medians of what fouls, leaks or drifts slowly, with the week a new level began. GET /api/units/{unit}/season */
export const seasonSchema = z
	.object({
		title: z.string(),
		traces: z.array(
			z.object({
				key: z.string(),
				label: z.string(),
				quantity: z.string(),
				weeks: z.array(z.object({ week: z.string(), value: z.number(), count: z.number().int() })),
				change: z.object({ week: z.string(), before: z.number(), after: z.number() }).nullable(),
				driftPerWeek: z.number().nullable()
			})
		),
		units: unitsSchema
	})
	.meta({ id: 'Season' });
export type Season = z.infer<typeof seasonSchema>;
