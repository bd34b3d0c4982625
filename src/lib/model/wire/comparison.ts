import { z } from 'zod';
import { OUTCOMES } from '../start';
import { idSchema, instantSchema, unitsSchema } from './common';

const share = z.object({
	k: z.number().int(),
	m: z.number().int(),
	low: z.number().nullable(),
	high: z.number().nullable()
});

export const comparisonGroupSchema = z.object({
	/** the group's expression, as it stands in the address */
	expression: z.string(),
	/** in words: "First tries that tripped" */
	label: z.string(),
	/** m eligible first tries, k of them start-up trips, Wilson's 95 % interval of k/m */
	firstTries: share,
	starts: z.array(z.object({ id: idSchema, startedAt: instantSchema, outcome: z.enum(OUTCOMES) }))
});

/** One row of the table of differences. Values are in the answer's units. */
export const differenceSchema = z.object({
	key: z.string(),
	label: z.string(),
	quantity: z.string(),
	a: z.number().nullable(),
	b: z.number().nullable(),
	countA: z.number().int(),
	countB: z.number().int(),
	/** Hodges–Lehmann shift, A minus B, its interval and the coverage achieved (0…1) */
	shift: z.number().nullable(),
	low: z.number().nullable(),
	high: z.number().nullable(),
	coverage: z.number().nullable(),
	/** quantity of the shift, when it differs from that of the values (temperature → difference) */
	shiftQuantity: z.string(),
	/** share of pairs in which A is above B, ties half */
	superiority: z.number().nullable(),
	role: z.enum(['tested', 'exploratory', 'too-few', 'described']),
	clear: z.boolean(),
	/** "always lower", "no clear difference" */
	words: z.string()
});
export type Difference = z.infer<typeof differenceSchema>;

const envelopeSide = z.object({
	count: z.number().int(),
	/** seconds from the start */
	t: z.array(z.number()),
	median: z.array(z.number().nullable()),
	low: z.array(z.number().nullable()),
	high: z.array(z.number().nullable()),
	/** where the group falls below 80 % of itself; null while it stays whole */
	wholeUntil: z.number().nullable()
});
export const envelopeSchema = z.object({
	signal: z.string(),
	label: z.string(),
	quantity: z.string(),
	family: z.string(),
	a: envelopeSide,
	b: envelopeSide
});
export type Envelope = z.infer<typeof envelopeSchema>;

/** GET /api/units/{unit}/comparison?a=…&b=… */
export const comparisonSchema = z
	.object({
		/** the finding first, then one sentence for each further difference that matters */
		sentences: z.array(z.string()),
		/** how surprising the split is, in words */
		chance: z.string().nullable(),
		/** "in the logs you gave: 9 of 14 mornings covered" */
		coverageSentence: z.string().nullable(),
		tooFew: z.string().nullable(),
		a: comparisonGroupSchema,
		b: comparisonGroupSchema,
		differences: z.array(differenceSchema),
		/** method, size of the family and the strongest result possible */
		footnote: z.string().nullable(),
		landmarks: z.array(
			z.object({
				seconds: z.number(),
				countA: z.number().int(),
				countB: z.number().int(),
				rows: z.array(
					z.object({
						signal: z.string(),
						label: z.string(),
						quantity: z.string(),
						described: z.boolean(),
						a: z.number().nullable(),
						b: z.number().nullable()
					})
				)
			})
		),
		envelopes: z.array(envelopeSchema),
		horizonSeconds: z.number().nullable(),
		crossTable: z
			.object({
				rows: z.string(),
				columns: z.array(z.string()),
				cells: z.array(z.object({ label: z.string(), shares: z.array(share.nullable()) })),
				note: z.string().nullable()
			})
			.nullable(),
		/** ready-made pairs of groups to choose from */
		presets: z.array(z.object({ label: z.string(), a: z.string(), b: z.string() })).optional(),
		units: unitsSchema
	})
	.meta({ id: 'Comparison' });
export type Comparison = z.infer<typeof comparisonSchema>;
