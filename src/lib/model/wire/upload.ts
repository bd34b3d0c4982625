import { z } from 'zod';
import { idSchema, instantSchema } from './common';

/** A log on its way in parts, so that a broken connection goes on where it stopped. */

export const uploadInputSchema = z
	.object({
		files: z
			.array(z.object({ name: z.string().trim().min(1).max(300), bytes: z.number().int().positive() }))
			.min(1)
			.max(400),
		name: z.string().trim().max(200).optional(),
		timeZone: z.string().max(60).optional(),
		mapping: z.enum(['auto', 'ask']).default('auto'),
		fingerprint: z.string().trim().min(8).max(200).optional().meta({
			description: 'your own mark of these very files: the same mark again gives the open upload back, to go on with'
		})
	})
	.meta({ id: 'UploadInput' });
export type UploadInput = z.output<typeof uploadInputSchema>;

export const uploadSchema = z
	.object({
		id: idSchema,
		unitId: idSchema,
		name: z.string(),
		files: z.array(
			z.object({
				name: z.string(),
				bytes: z.number(),
				received: z.number().meta({ description: 'bytes that are safe in the store; send on from here' })
			})
		),
		bytes: z.number(),
		received: z.number(),
		fingerprint: z.string().nullable(),
		logId: idSchema.nullable().meta({ description: 'the log it became' }),
		createdAt: instantSchema,
		expiresAt: instantSchema.meta({ description: 'nothing of it is kept after this; each part moves it on' })
	})
	.meta({ id: 'Upload' });
export type Upload = z.infer<typeof uploadSchema>;
