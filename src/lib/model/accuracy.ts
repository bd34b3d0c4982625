import { z } from 'zod';

/** One measured share, with its aim where there is one and its 95 % interval (Wilson). Shares are 0…1. */
export const measureSchema = z.object({
	key: z.string(),
	words: z.string(),
	aim: z.number().nullable(),
	/** the aim is an upper bound */
	atMost: z.boolean(),
	hit: z.number().int(),
	of: z.number().int(),
	/** null when there was nothing to count */
	value: z.number().nullable(),
	low: z.number().nullable(),
	high: z.number().nullable()
});
export type Measure = z.infer<typeof measureSchema>;

/** How often the method was right on the logs of the evaluation's plant model; written by `npm run evaluate -- --write`. */
export const accuracySchema = z
	.object({
		/** day of the evaluation, UTC */
		measuredAt: z.string(),
		methodVersion: z.string(),
		groups: z.array(
			z.object({
				key: z.enum(['upTo15', 'upTo60', 'all']),
				words: z.string(),
				logs: z.number().int(),
				soundLogs: z.number().int(),
				faultLogs: z.number().int(),
				measures: z.array(measureSchema)
			})
		),
		/** faults by family: logs whose cause can be told, right first, right among two, nothing said, another first */
		families: z.array(
			z.object({
				key: z.string(),
				told: z.number().int(),
				first: z.number().int(),
				firstTwo: z.number().int(),
				silent: z.number().int(),
				wrong: z.number().int()
			})
		)
	})
	.meta({ id: 'Accuracy' });
export type Accuracy = z.infer<typeof accuracySchema>;
