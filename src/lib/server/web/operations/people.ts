import { ROLES } from '$lib/model/people';
import { instantSchema } from '$lib/model/wire/common';
import { keyInputSchema } from '$lib/model/wire/office';
import { z } from 'zod';
import { operation } from '../operation';

const preferences = z.object({ units: z.enum(['ip', 'si']), paper: z.enum(['day', 'night', 'system']) });
const me = z
	.object({ id: z.uuid(), name: z.string(), email: z.string(), role: z.enum(ROLES), office: z.string(), preferences })
	.meta({ id: 'Me' });
const key = z
	.object({
		id: z.uuid(),
		name: z.string(),
		prefix: z.string(),
		member: z.string(),
		role: z.enum(ROLES),
		scopes: z.array(z.string()),
		siteIds: z.array(z.string()).nullable(),
		expiresAt: instantSchema.nullable(),
		usedAt: instantSchema.nullable(),
		revokedAt: instantSchema.nullable(),
		createdAt: instantSchema
	})
	.meta({ id: 'ApiKey' });

export const getMe = operation({
	method: 'get',
	path: '/api/me',
	summary: 'Who you are here',
	right: 'read',
	response: me
});
export const changeMe = operation({
	method: 'patch',
	path: '/api/me',
	summary: 'Your units of measure and paper',
	right: 'read',
	body: preferences.partial(),
	response: me
});
export const listKeys = operation({
	method: 'get',
	path: '/api/keys',
	summary: 'API keys of the office',
	right: 'office',
	response: z.object({ keys: z.array(key) })
});
export const addKey = operation({
	method: 'post',
	path: '/api/keys',
	summary: 'Makes an API key; it is shown once',
	right: 'office',
	body: keyInputSchema,
	response: z.object({ id: z.uuid(), key: z.string() }),
	status: 201
});
export const revokeKey = operation({
	method: 'delete',
	path: '/api/keys/{key}',
	summary: 'Revokes an API key',
	right: 'office',
	status: 204
});
