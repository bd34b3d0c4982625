import { ERROR_KINDS } from '$lib/model/errors';
import { problemSchema } from '$lib/model/wire/common';
import { createDocument, type ZodOpenApiOperationObject, type ZodOpenApiPathsObject } from 'zod-openapi';
import type { z } from 'zod';
import type { Operation } from './operation';
import { OPERATIONS } from './operations';

const problem = (description: string) => ({
	description,
	content: { 'application/problem+json': { schema: problemSchema } }
});

function responsesOf(operation: Operation): ZodOpenApiOperationObject['responses'] {
	const content: Record<string, { schema: z.ZodType } | { schema: { type: 'string'; format: 'binary' } }> = {};
	if (operation.response) content['application/json'] = { schema: operation.response };
	for (const type of operation.responseTypes ?? []) content[type] = { schema: { type: 'string', format: 'binary' } };
	const status = String(operation.status ?? 200) as `${1 | 2 | 3 | 4 | 5}${string}`;
	const problems = Object.values(ERROR_KINDS).map(({ status: code, title }) => [String(code), problem(title)]);
	return {
		[status]: { description: 'Done', ...(Object.keys(content).length > 0 ? { content } : {}) },
		...Object.fromEntries(problems)
	};
}

function bodyOf(operation: Operation): ZodOpenApiOperationObject['requestBody'] {
	if (operation.bodyTypes) {
		const binary = { schema: { type: 'string' as const, format: 'binary' } };
		return { required: true, content: Object.fromEntries(operation.bodyTypes.map((type) => [type, binary])) };
	}
	return operation.body ? { required: true, content: { 'application/json': { schema: operation.body } } } : undefined;
}

function described(operation: Operation): ZodOpenApiOperationObject {
	const names = [...operation.path.matchAll(/\{(\w+)\}/g)].map((match) => match[1] ?? '');
	const requestBody = bodyOf(operation);
	return {
		summary: operation.summary,
		tags: [operation.path.split('/')[2] ?? 'api'],
		parameters: names.map((name) => ({
			name,
			in: 'path' as const,
			required: true,
			schema: { type: 'string' as const, format: 'uuid' }
		})),
		...(operation.query ? { requestParams: { query: operation.query as z.ZodObject } } : {}),
		...(requestBody ? { requestBody } : {}),
		responses: responsesOf(operation)
	};
}

/** The OpenAPI 3.1 document of the public API, from the very schemas that validate. */
export function openApiDocument(origin: string) {
	const paths: ZodOpenApiPathsObject = {};
	for (const operation of OPERATIONS)
		paths[operation.path] = { ...paths[operation.path], [operation.method]: described(operation) };
	return createDocument({
		openapi: '3.1.0',
		info: {
			title: 'Firstpull',
			version: '1',
			description:
				'Times are ISO 8601 UTC. Quantities are SI unless ?units=ip; every answer with quantities says its units. Pressures are absolute. Errors are RFC 9457 problem details. Unsafe calls accept Idempotency-Key.'
		},
		servers: [{ url: origin }],
		security: [{ key: [] }, { session: [] }],
		components: {
			securitySchemes: {
				key: { type: 'http', scheme: 'bearer', description: 'an API key' },
				session: { type: 'apiKey', in: 'cookie', name: 'firstpull_session' }
			}
		},
		paths
	});
}
