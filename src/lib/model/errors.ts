/** What can go wrong with a request, in one place; the web layer turns each into RFC 9457 problem details. */

export const ERROR_KINDS = {
	unauthenticated: { status: 401, title: 'Sign in first' },
	forbidden: { status: 403, title: 'Not allowed' },
	'not-found': { status: 404, title: 'Not found' },
	conflict: { status: 409, title: 'Already there' },
	'too-large': { status: 413, title: 'Too large' },
	unsupported: { status: 415, title: 'Not a log' },
	invalid: { status: 422, title: 'Not valid' },
	'too-many': { status: 429, title: 'Too many requests' },
	unavailable: { status: 503, title: 'Not available now' }
} as const;
export type ErrorKind = keyof typeof ERROR_KINDS;

export type ErrorLine = { line?: number | null; column?: string | null; field?: string | null; message: string };

/** An error with a kind that callers and pages can act on. */
export class AppError extends Error {
	readonly kind: ErrorKind;
	readonly errors: readonly ErrorLine[];
	/** Where the thing already is (conflict). */
	readonly location: string | null;
	readonly retryAfterSeconds: number | null;

	constructor(
		kind: ErrorKind,
		detail: string,
		extra: { errors?: readonly ErrorLine[]; location?: string; retryAfterSeconds?: number } = {}
	) {
		super(detail);
		this.name = 'AppError';
		this.kind = kind;
		this.errors = extra.errors ?? [];
		this.location = extra.location ?? null;
		this.retryAfterSeconds = extra.retryAfterSeconds ?? null;
	}
}

/** A 404 for what is not there, or what this person may not know of. */
export const notFound = (what: string): AppError => new AppError('not-found', `There is no such ${what}.`);
