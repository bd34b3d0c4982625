import { z } from 'zod';
import { SIGNAL_KEYS } from '../signals';
import { idSchema, instantSchema } from './common';

const signalKey = z.enum(SIGNAL_KEYS as [string, ...string[]]);
export const LOG_STATES = ['received', 'reading', 'needs-mapping', 'analysing', 'ready', 'refused'] as const;

export const problemLineSchema = z.object({
	line: z.number().int().nullable(),
	column: z.string().nullable(),
	kind: z.string(),
	message: z.string()
});
export const mappingEntrySchema = z.object({
	file: z.string(),
	column: z.string(),
	signal: signalKey.nullable(),
	unitId: idSchema,
	circuit: z.string(),
	unitOfMeasure: z.string().nullable(),
	confidence: z.number(),
	confirmed: z.boolean()
});
/** One uploaded export (api.md). */
export const logSchema = z
	.object({
		id: idSchema,
		unitId: idSchema,
		name: z.string(),
		bytes: z.number(),
		sha256: z.string(),
		files: z.array(z.object({ name: z.string(), bytes: z.number(), sha256: z.string() })),
		state: z.enum(LOG_STATES),
		progress: z.number(),
		layout: z
			.object({
				kind: z.enum(['wide', 'long', 'per-signal']),
				delimiter: z.string(),
				decimal: z.enum(['.', ',']),
				encoding: z.string(),
				headerLine: z.number(),
				timeForm: z.string(),
				timeZone: z.string(),
				intervalSeconds: z.number().nullable()
			})
			.nullable(),
		mapping: z.array(mappingEntrySchema),
		rows: z.number(),
		samples: z.number(),
		firstAt: instantSchema.nullable(),
		lastAt: instantSchema.nullable(),
		quality: z.object({
			gaps: z.number(),
			longestGapSeconds: z.number(),
			repeats: z.number(),
			outOfOrder: z.number(),
			badValues: z.record(z.string(), z.number()),
			coverage: z.number(),
			conflicts: z.number().int().meta({
				description: 'readings that differ from those of overlapping logs; the later upload’s count'
			})
		}),
		problems: z.array(problemLineSchema),
		createdAt: instantSchema
	})
	.meta({ id: 'Log' });
export type Log = z.infer<typeof logSchema>;

/** What PUT …/mapping takes: the columns as a person wants them, and answers to the reader's questions. */
export const mappingInputSchema = z
	.object({
		mapping: z.array(
			mappingEntrySchema.partial({ confidence: true, confirmed: true, circuit: true, unitOfMeasure: true })
		),
		timeZone: z.string().optional(),
		choices: z.record(z.string(), z.string()).optional()
	})
	.meta({ id: 'MappingInput' });

/** What the mapping page shows of a log: columns with previews, and the choices made. GET /api/logs/{log}/preview */
export const logPreviewSchema = z
	.object({
		columns: z.array(
			z.object({
				file: z.string(),
				column: z.string(),
				role: z.enum(['time', 'signal', 'point-name', 'value', 'status', 'unknown']),
				guess: mappingEntrySchema,
				reasons: z.array(z.string()),
				range: z.object({ least: z.number(), most: z.number() }).nullable(),
				trace: z.array(z.number().nullable()),
				cells: z.array(z.string())
			})
		),
		lines: z.array(z.number().int()).meta({ description: 'line numbers of `cells`' }),
		choices: z.array(
			z.object({
				key: z.string(),
				question: z.string(),
				chosen: z.string(),
				options: z.array(z.object({ value: z.string(), label: z.string(), sample: z.string() })),
				sure: z.boolean()
			})
		)
	})
	.meta({ id: 'LogPreview' });
export type LogPreview = z.infer<typeof logPreviewSchema>;
