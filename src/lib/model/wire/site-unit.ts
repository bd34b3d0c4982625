import { z } from 'zod';
import { contactSchema, LIMIT_KEYS, namePlateSchema, natureSchema, provenanceSchema, refrigerantSchema } from '../unit';
import { idSchema, instantSchema } from './common';

/** Is `zone` an IANA time zone this machine knows? */
function isTimeZone(zone: string): boolean {
	try {
		return Boolean(new Intl.DateTimeFormat('en', { timeZone: zone }));
	} catch {
		return false;
	}
}
const timeZoneSchema = z.string().refine(isTimeZone, 'is not an IANA time zone, for example Europe/Berlin');

export const siteInputSchema = z
	.object({
		name: z.string().trim().min(1).max(120),
		timeZone: timeZoneSchema,
		address: z.string().trim().max(300).nullable().optional(),
		altitude: z.number().min(-500).max(9000).nullable().optional().meta({ description: 'm above sea level' }),
		contacts: z.array(contactSchema).max(30).optional(),
		accessNotes: z.string().trim().max(1000).nullable().optional(),
		onCallId: idSchema.nullable().optional().meta({ description: 'the member who is told at once' })
	})
	.meta({ id: 'SiteInput' });
export const siteSchema = z
	.object({
		id: idSchema,
		name: z.string(),
		timeZone: z.string(),
		address: z.string().nullable(),
		altitude: z.number().nullable(),
		contacts: z.array(contactSchema).optional(),
		accessNotes: z.string().nullable().optional(),
		onCallId: idSchema.nullable().optional()
	})
	.meta({ id: 'Site' });
export type Site = z.infer<typeof siteSchema>;

const limitValueSchema = z.object({
	value: z.number(),
	provenance: provenanceSchema.default('given'),
	validFrom: instantSchema.nullable().optional(),
	note: z.string().max(300).optional()
});
/** A bare number is the caller's own for all time; null takes the limit away. */
export const limitInputSchema = z.union([z.number(), limitValueSchema, z.array(limitValueSchema), z.null()]);
const limitsInputSchema = z.partialRecord(z.enum(LIMIT_KEYS), limitInputSchema);
export type LimitsInput = z.infer<typeof limitsInputSchema>;

const tagSchema = z.string().trim().min(1).max(60);
export const unitInputSchema = z
	.object({
		siteId: idSchema,
		tag: tagSchema,
		refrigerant: refrigerantSchema,
		circuits: z.number().int().min(1).max(4).default(1),
		nature: natureSchema.default({}),
		limits: limitsInputSchema.default({}),
		namePlate: namePlateSchema.optional(),
		deliveryHours: z
			.number()
			.positive()
			.max(2400)
			.nullable()
			.optional()
			.meta({ description: 'a log is expected at least this often, h' })
	})
	.meta({ id: 'UnitInput' });
export const unitPatchSchema = unitInputSchema
	.omit({ siteId: true })
	.partial()
	.extend({
		nature: natureSchema.optional(),
		limits: limitsInputSchema.optional(),
		circuits: z.number().int().min(1).max(4).optional()
	})
	.meta({ id: 'UnitPatch' });

export const unitSchema = z
	.object({
		id: idSchema,
		siteId: idSchema,
		tag: z.string(),
		refrigerant: refrigerantSchema,
		circuits: z.number().int(),
		nature: natureSchema,
		namePlate: namePlateSchema.optional(),
		deliveryHours: z.number().nullable().optional(),
		limits: z.partialRecord(
			z.enum(LIMIT_KEYS),
			z.array(
				z.object({
					value: z.number(),
					provenance: provenanceSchema,
					validFrom: instantSchema.nullable(),
					note: z.string().optional()
				})
			)
		)
	})
	.meta({
		id: 'Unit',
		description: 'limits in °C, K, kPa absolute, %, s; each a list by the instant it is valid from'
	});
export type Unit = z.infer<typeof unitSchema>;
