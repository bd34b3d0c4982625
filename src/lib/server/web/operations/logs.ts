import { instantSchema, pageQuerySchema } from '$lib/model/wire/common';
import { logPreviewSchema, logSchema, mappingInputSchema } from '$lib/model/wire/log';
import { uploadInputSchema, uploadSchema } from '$lib/model/wire/upload';
import { z } from 'zod';
import { operation } from '../operation';

const log = '/api/logs/{log}';
const upload = '/api/uploads/{upload}';

export const listLogs = operation({
	method: 'get',
	path: '/api/units/{unit}/logs',
	summary: 'A unit’s logs, newest first',
	right: 'read',
	query: pageQuerySchema,
	response: z.object({ logs: z.array(logSchema), nextCursor: z.string().nullable() })
});
export const addLog = operation({
	method: 'post',
	path: '/api/units/{unit}/logs',
	summary: 'Uploads a log: the file itself as the body, or multipart with several parts that make one log',
	right: 'logs',
	query: z.object({
		name: z.string().max(200).optional(),
		timeZone: z.string().max(60).optional(),
		mapping: z.enum(['auto', 'ask']).default('auto')
	}),
	bodyTypes: ['text/csv', 'application/gzip', 'application/zip', 'application/octet-stream', 'multipart/form-data'],
	response: z.object({ log: logSchema }),
	status: 202
});
export const getLog = operation({ method: 'get', path: log, summary: 'One log', right: 'read', response: logSchema });
export const removeLog = operation({
	method: 'delete',
	path: log,
	summary: 'Removes a log with its samples and what was computed from them',
	right: 'logs',
	status: 204
});
export const watchLog = operation({
	method: 'get',
	path: `${log}/progress`,
	summary: 'Server-sent events with the log until it is ready, needs-mapping or refused',
	right: 'read',
	responseTypes: ['text/event-stream']
});
export const previewLog = operation({
	method: 'get',
	path: `${log}/preview`,
	summary: 'What the mapping page shows: columns with their guess, range, trace and cells, and the choices made',
	right: 'read',
	response: logPreviewSchema
});
export const mapLog = operation({
	method: 'put',
	path: `${log}/mapping`,
	summary: 'Confirms or changes a mapping, and reads the log again with it',
	right: 'logs',
	body: mappingInputSchema,
	response: logSchema
});
export const originalLog = operation({
	method: 'get',
	path: `${log}/original`,
	summary: 'One file of a log, byte for byte as it came',
	right: 'read',
	query: z.object({ file: z.coerce.number().int().min(0).default(0) }),
	responseTypes: ['application/octet-stream']
});
export const exportUnit = operation({
	method: 'get',
	path: '/api/units/{unit}/export',
	summary: 'Any window of a circuit’s samples as CSV, a spreadsheet or a Haystack Zinc grid',
	right: 'read',
	query: z.object({
		from: instantSchema,
		to: instantSchema,
		circuit: z.string().default('1'),
		signals: z.string().max(2000).optional(),
		format: z.enum(['csv', 'xlsx', 'zinc']).default('csv'),
		units: z.enum(['si', 'ip']).optional()
	}),
	responseTypes: ['text/csv', 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet', 'text/zinc']
});
export const listUploads = operation({
	method: 'get',
	path: '/api/units/{unit}/uploads',
	summary: 'Your uploads in parts to this unit that are not a log yet',
	right: 'read',
	response: z.object({ uploads: z.array(uploadSchema) })
});
export const beginUpload = operation({
	method: 'post',
	path: '/api/units/{unit}/uploads',
	summary: 'Begins an upload in parts, for big files on bad connections; the same fingerprint again gives the open one',
	right: 'logs',
	body: uploadInputSchema,
	response: uploadSchema,
	status: 201
});
export const getUpload = operation({
	method: 'get',
	path: upload,
	summary: 'How far an upload is: the bytes of each file that are safe, where to send on from',
	right: 'logs',
	response: uploadSchema
});
export const sendPart = operation({
	method: 'put',
	path: upload,
	summary: 'One part of a file, from its first missing byte; what has arrived when the connection breaks is kept',
	right: 'logs',
	query: z.object({
		file: z.coerce.number().int().min(0).max(399).default(0),
		from: z.coerce.number().int().min(0)
	}),
	bodyTypes: ['application/octet-stream'],
	response: uploadSchema
});
export const finishUpload = operation({
	method: 'post',
	path: `${upload}/log`,
	summary: 'Makes the log of an upload that is whole; asked again it gives the same log',
	right: 'logs',
	response: z.object({ log: logSchema }),
	status: 202
});
export const dropUpload = operation({
	method: 'delete',
	path: upload,
	summary: 'Gives an upload up; nothing of it is kept',
	right: 'logs',
	status: 204
});
