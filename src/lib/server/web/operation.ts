import type { Right } from '$lib/model/people';
import type { z } from 'zod';

/** One call of the public API: what validates it and what documents it are the same. */
export type Operation = {
	method: 'get' | 'post' | 'put' | 'patch' | 'delete';
	/** with {names} in braces */
	path: string;
	summary: string;
	right: Right;
	query?: z.ZodType;
	body?: z.ZodType;
	/** Media types of a body that is not JSON (an upload). */
	bodyTypes?: readonly string[];
	response?: z.ZodType;
	/** Media types of an answer that is not JSON. */
	responseTypes?: readonly string[];
	/** Status of success; 200 unless said. */
	status?: number;
};

/** Keeps an operation's own schema types. */
export const operation = <const O extends Operation>(o: O): O => o;
