import { AppError } from '$lib/model/errors';
import { fail, type ActionFailure } from '@sveltejs/kit';
import type { z } from 'zod';

/** What a form that did not go through gives back: what was typed, but for secrets, and what is wrong beside it. */
export type Refused = { kept: Record<string, string>; errors: Record<string, string>; message: string | null };

const SECRET = new Set(['password', 'old', 'code', 'token']);

function keptOf(values: Record<string, string>): Record<string, string> {
	return Object.fromEntries(Object.entries(values).filter(([name]) => !SECRET.has(name)));
}

function refused(status: number, values: Record<string, string>, issues: { field: string; message: string }[]) {
	const errors: Record<string, string> = {};
	for (const { field, message } of issues) errors[field] ??= message;
	return { status, data: { kept: keptOf(values), errors, message: null } };
}

/**
 * Runs a form's action with values that its schema has checked. What does not fit, and what the service refuses, comes
 * back beside the fields; the rest of what was typed is kept.
 */
export async function withForm<S extends z.ZodType, T>(
	request: Request,
	schema: S,
	run: (data: z.output<S>) => Promise<T>
): Promise<T | ActionFailure<Refused>> {
	const values: Record<string, string> = {};
	for (const [name, value] of await request.formData()) if (typeof value === 'string') values[name] = value;
	const parsed = schema.safeParse(values);
	if (!parsed.success) {
		const issues = parsed.error.issues.map((issue) => ({ field: issue.path.join('.'), message: issue.message }));
		const { status, data } = refused(422, values, issues);
		return fail(status, data);
	}
	try {
		return await run(parsed.data);
	} catch (error) {
		if (!(error instanceof AppError)) throw error;
		const fields = error.errors.flatMap(({ field }) => (field ? [{ field, message: error.message }] : []));
		const { status, data } = refused(error.kind === 'too-many' ? 429 : 422, values, fields);
		return fail(status, { ...data, message: fields.length > 0 ? null : error.message });
	}
}
