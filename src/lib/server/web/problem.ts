import { AppError, ERROR_KINDS } from '$lib/model/errors';
import type { Problem } from '$lib/model/wire/common';
import type { z } from 'zod';

/** Problem details of an error that is ours; null for one that is not. */
export function problemOf(error: unknown): Problem | null {
	if (!(error instanceof AppError)) return null;
	const { status, title } = ERROR_KINDS[error.kind];
	return {
		type: `/api#${error.kind}`,
		title,
		status,
		detail: error.message,
		...(error.errors.length > 0 ? { errors: [...error.errors] } : {})
	};
}

/** An RFC 9457 answer. */
export function problemResponse(problem: Problem, headers: Record<string, string> = {}): Response {
	return new Response(JSON.stringify(problem), {
		status: problem.status,
		headers: { 'content-type': 'application/problem+json', 'cache-control': 'no-store', ...headers }
	});
}

/** The answer to any error a route throws; one that is not ours becomes a bare 500. */
export function errorResponse(error: unknown): Response {
	const problem = problemOf(error);
	if (!problem || !(error instanceof AppError)) {
		return problemResponse({ type: 'about:blank', title: 'Something went wrong here', status: 500 });
	}
	const headers: Record<string, string> = {};
	if (error.location) headers.location = error.location;
	if (error.retryAfterSeconds !== null) headers['retry-after'] = String(error.retryAfterSeconds);
	if (problem.status === 401) headers['www-authenticate'] = 'Bearer';
	return problemResponse(problem, headers);
}

/** What zod found wrong, as a 422 that names the fields. */
export function invalid(error: z.ZodError, what: string): AppError {
	const errors = error.issues.map((issue) => ({ field: issue.path.join('.') || null, message: issue.message }));
	const first = errors[0];
	const where = first?.field ? `${first.field}: ` : '';
	return new AppError('invalid', `The ${what} does not fit. ${where}${first?.message ?? ''}`, { errors });
}
