import { z } from 'zod';
import { accuracySchema } from '../accuracy';
import { provenanceSchema } from '../unit';

/** GET /api/method: what is computed, how, and where each number comes from. */
export const methodSchema = z
	.object({
		version: z.string(),
		sections: z.array(
			z.object({
				key: z.string(),
				title: z.string(),
				lead: z.string(),
				entries: z.array(
					z.object({
						name: z.string(),
						says: z.string(),
						formula: z.string().optional(),
						origin: provenanceSchema,
						source: z.string().optional()
					})
				)
			})
		),
		/** the table of suspects: which clues speak for and against, with our weights, and what decides */
		suspects: z.array(
			z.object({
				key: z.string(),
				name: z.string(),
				clues: z.array(z.object({ words: z.string(), direction: z.enum(['for', 'against']), weight: z.number() })),
				check: z.string()
			})
		),
		/** how often the method was right on the evaluation's plant model */
		accuracy: accuracySchema,
		cautions: z.array(z.string())
	})
	.meta({ id: 'Method' });
export type Method = z.infer<typeof methodSchema>;
