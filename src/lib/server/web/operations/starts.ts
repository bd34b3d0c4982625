import { OUTCOMES } from '$lib/model/start';
import { idSchema, instantSchema, pageQuerySchema } from '$lib/model/wire/common';
import { notedInputSchema, recordSchema } from '$lib/model/wire/noted';
import { startCorrectionSchema, startSchema, suspectsSchema } from '$lib/model/wire/start';
import { firstMoverSchema, startSheetSchema } from '$lib/model/wire/start-sheet';
import { tracesSchema } from '$lib/model/wire/views';
import { TRACES_BINARY } from '$lib/utils/traces-binary';
import { z } from 'zod';
import { operation } from '../operation';

const units = z.enum(['si', 'ip']).optional();
const traceQuery = z.object({
	signals: z.string().max(2000).optional().meta({ description: 'signal and derived keys, comma-separated' }),
	px: z.coerce.number().int().min(1).max(20000).optional(),
	units
});

export const listStarts = operation({
	method: 'get',
	path: '/api/units/{unit}/starts',
	summary: 'A unit’s starts, oldest first',
	right: 'read',
	query: pageQuerySchema.extend({
		from: instantSchema.optional(),
		to: instantSchema.optional(),
		outcome: z.enum(OUTCOMES).optional(),
		circuit: z.string().optional(),
		source: z.enum(['log', 'noted', 'all']).default('log').meta({
			description: 'those of trend logs, those known without one (typed, alarm lists), or both'
		}),
		units
	}),
	response: z.object({ starts: z.array(startSchema), nextCursor: z.string().nullable() })
});
export const getStart = operation({
	method: 'get',
	path: '/api/starts/{start}',
	summary: 'One start with its clues, neighbours, held starts, headroom and advice',
	right: 'read',
	query: z.object({ units }),
	response: startSheetSchema
});
export const getFirstMover = operation({
	method: 'get',
	path: '/api/starts/{start}/first-mover',
	summary: 'Which signal left the held starts’ band first, with the errors of the order',
	right: 'read',
	query: z.object({ units }),
	response: firstMoverSchema
});
export const getSuspects = operation({
	method: 'get',
	path: '/api/units/{unit}/suspects',
	summary: 'Ranked suspects with clues for, against and missing; without a circuit the top is that of the worst',
	right: 'read',
	query: z.object({
		from: instantSchema.optional(),
		to: instantSchema.optional(),
		circuit: z.string().optional(),
		units
	}),
	response: suspectsSchema
});
export const correctStart = operation({
	method: 'patch',
	path: '/api/starts/{start}',
	summary: 'A person’s correction of a start, with its reason',
	right: 'logs',
	body: startCorrectionSchema,
	response: startSchema
});
export const startTraces = operation({
	method: 'get',
	path: '/api/starts/{start}/traces',
	summary: 'Reduced traces around a start that keep every extreme',
	right: 'read',
	query: traceQuery.extend({
		before: z.coerce.number().min(0).max(86400).optional(),
		after: z.coerce.number().min(1).max(172800).optional()
	}),
	response: tracesSchema,
	responseTypes: [TRACES_BINARY]
});
export const unitTraces = operation({
	method: 'get',
	path: '/api/units/{unit}/traces',
	summary: 'The same for any window of a unit’s circuit',
	right: 'read',
	query: traceQuery.extend({ from: instantSchema, to: instantSchema, circuit: z.string().optional() }),
	response: tracesSchema,
	responseTypes: [TRACES_BINARY]
});
export const getRecord = operation({
	method: 'get',
	path: '/api/units/{unit}/record',
	summary: 'Starts without a trend log: typed, from alarm lists, and what the counters tell',
	right: 'read',
	query: z.object({ units }),
	response: recordSchema
});
export const addNoted = operation({
	method: 'post',
	path: '/api/units/{unit}/record',
	summary: 'Types in a start, with a handful of readings, or a reading of the starts and hours counters',
	right: 'field',
	body: notedInputSchema,
	response: z.object({ id: idSchema }),
	status: 201
});
export const removeNoted = operation({
	method: 'delete',
	path: '/api/units/{unit}/record/{entry}',
	summary: 'Takes a typed entry away',
	right: 'field',
	status: 204
});
