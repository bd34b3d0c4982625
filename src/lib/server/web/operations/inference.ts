import { instantSchema } from '$lib/model/wire/common';
import { comparisonSchema } from '$lib/model/wire/comparison';
import { nightsSchema } from '$lib/model/wire/nights';
import { proofSchema, repeatersSchema } from '$lib/model/wire/proof';
import { seasonSchema } from '$lib/model/wire/season';
import { z } from 'zod';
import { operation } from '../operation';

const units = z.enum(['si', 'ip']).optional();

export const getProof = operation({
	method: 'get',
	path: '/api/units/{unit}/proof',
	summary: 'Whether the exposed starts since a change (the last unless named) show that something changed',
	right: 'read',
	query: z.object({ change: z.uuid().optional(), circuit: z.string().optional(), units }),
	response: proofSchema
});
export const listRepeaters = operation({
	method: 'get',
	path: '/api/repeaters',
	summary: 'The manager’s list: circuits by the trips to be expected in the next 14 days, with be-there-by times',
	right: 'readSuspects',
	query: z.object({ site: z.uuid().optional(), from: instantSchema.optional(), to: instantSchema.optional() }),
	response: repeatersSchema
});
export const getComparison = operation({
	method: 'get',
	path: '/api/units/{unit}/comparison',
	summary: 'Two groups of starts side by side: groups, tests, envelopes and sentences',
	right: 'readSuspects',
	query: z.object({
		a: z.string().max(4000).optional().meta({ description: 'a group expression such as first&clock<11:00, or ids:…' }),
		b: z.string().max(4000).optional(),
		circuit: z.string().optional(),
		from: instantSchema.optional(),
		to: instantSchema.optional(),
		units
	}),
	response: comparisonSchema
});
export const getNights = operation({
	method: 'get',
	path: '/api/units/{unit}/nights',
	summary: 'What the rests say about heater, valves, sensors and non-condensables, and tonight’s log',
	right: 'readSuspects',
	query: z.object({ circuit: z.string().default('1'), units }),
	response: nightsSchema
});
export const getSeason = operation({
	method: 'get',
	path: '/api/units/{unit}/season',
	summary: 'Weekly medians at like load with the weeks in which a new level began',
	right: 'readSuspects',
	query: z.object({ circuit: z.string().default('1'), units }),
	response: seasonSchema
});
