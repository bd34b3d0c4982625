import type { z } from 'zod';
import { ApiError } from './api';

/** A form that is checked by the API's own schema, sent to the API, and shows its refusals beside the fields. */
export class ApiForm {
	busy = $state(false);
	/** What is wrong with the whole; what was typed stays where it is. */
	message = $state<string | null>(null);
	errors = $state<Record<string, string>>({});

	/** The error beside a field, or null. */
	at(field: string): string | null {
		return this.errors[field] ?? null;
	}

	#refuse(issues: readonly { field: string; message: string }[], message: string): void {
		this.errors = Object.fromEntries(issues.map((issue) => [issue.field, issue.message]));
		this.message = message;
	}

	/**
	 * Checks values by a schema and sends them. Gives the answer, or null when something was wrong (it is shown then).
	 */
	async send<S extends z.ZodType, T>(
		schema: S,
		values: unknown,
		call: (input: z.output<S>) => Promise<T>
	): Promise<T | null> {
		if (this.busy) return null;
		const parsed = schema.safeParse(values);
		if (!parsed.success) {
			const issues = parsed.error.issues.map((issue) => ({ field: issue.path.join('.'), message: issue.message }));
			this.#refuse(issues, 'Something is missing or does not fit.');
			return null;
		}
		this.busy = true;
		this.message = null;
		this.errors = {};
		try {
			return await call(parsed.data);
		} catch (error) {
			if (error instanceof ApiError) {
				const issues = (error.problem.errors ?? []).flatMap((entry) =>
					entry.field ? [{ field: entry.field, message: entry.message }] : []
				);
				this.#refuse(issues, error.message);
			} else this.message = 'No answer from the server. What was typed is still here: try again.';
			return null;
		} finally {
			this.busy = false;
		}
	}
}
