import { z } from 'zod';
import { TRIP_KINDS } from '../start';
import { idSchema, instantSchema } from './common';

/** Words of a controller's alarms that name a trip kind: a person's own, before the trade's. */

export const tripWordInputSchema = z
	.object({
		words: z.string().trim().min(2).max(80).meta({ description: 'whole words as the alarm has them, or its code' }),
		kind: z.enum(TRIP_KINDS),
		unitId: idSchema.nullable().default(null).meta({ description: 'null: for every unit of the organisation' })
	})
	.meta({ id: 'TripWordInput' });
export type TripWordInput = z.output<typeof tripWordInputSchema>;

export const tripWordSchema = z
	.object({
		id: idSchema,
		words: z.string(),
		kind: z.enum(TRIP_KINDS),
		unitId: idSchema.nullable(),
		by: z.string(),
		createdAt: instantSchema
	})
	.meta({ id: 'TripWord' });
export type TripWord = z.infer<typeof tripWordSchema>;

/** GET /api/units/{unit}/trip-words: the words in force, and texts of this unit that no word names. */
export const tripWordsSchema = z
	.object({
		words: z.array(tripWordSchema),
		unnamed: z
			.array(z.object({ text: z.string(), times: z.number().int() }))
			.meta({ description: 'recorded trips whose kind is not known, by their text, most frequent first' })
	})
	.meta({ id: 'TripWords' });
export type TripWords = z.infer<typeof tripWordsSchema>;
