import { instantSchema } from '$lib/model/wire/common';
import { proofSchema, repeatersSchema } from '$lib/model/wire/proof';
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
