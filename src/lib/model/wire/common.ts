import { z } from 'zod';

/** Pieces that several API shapes share (api.md). */
export const idSchema = z.uuid();
export const instantSchema = z.iso
	.datetime({ offset: true })
	.meta({ description: 'ISO 8601; answers are always UTC with Z' });
export const unitSystemSchema = z.enum(['si', 'ip']);

/** RFC 9457 problem details. */
export const problemSchema = z
	.object({
		type: z.string(),
		title: z.string(),
		status: z.number().int(),
		detail: z.string().optional(),
		instance: z.string().optional(),
		errors: z
			.array(
				z.object({
					line: z.number().int().nullable().optional(),
					column: z.string().nullable().optional(),
					field: z.string().nullable().optional(),
					message: z.string()
				})
			)
			.optional()
	})
	.meta({ id: 'Problem' });
export type Problem = z.infer<typeof problemSchema>;

/** Which unit of measure each quantity of an answer is in, as printed. */
export const unitsSchema = z
	.record(z.string(), z.string())
	.meta({ id: 'Units', description: 'quantity → unit of measure of this answer, for example temperature → °C' });
export type Units = z.infer<typeof unitsSchema>;

/** Lists answer a page of items and the cursor of the next, null at the end. */
export const pageQuerySchema = z.object({
	limit: z.coerce.number().int().min(1).max(5000).default(500),
	cursor: z.string().optional()
});
