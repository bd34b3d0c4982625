import { AppError } from '$lib/model/errors';
import { isActionFailure } from '@sveltejs/kit';
import { expect, it } from 'vitest';
import { z } from 'zod';
import { withForm } from './form';

// An invented form.
const schema = z.object({ email: z.email('No address.'), password: z.string().min(3, 'Too short.') });
const asked = (values: Record<string, string>): Request =>
	new Request('http://x/', { method: 'POST', body: new URLSearchParams(values) });
const refusal = (result: unknown) => (isActionFailure(result) ? { status: result.status, data: result.data } : null);

it('gives what was typed back with what is wrong beside it, and never a secret', async () => {
	const result = await withForm(asked({ email: 'nobody', password: 'ab' }), schema, () => Promise.resolve('ran'));
	expect(refusal(result)).toEqual({
		status: 422,
		data: { kept: { email: 'nobody' }, errors: { email: 'No address.', password: 'Too short.' }, message: null }
	});
});

it('puts a refusal beside its field, or over the form when it has none', async () => {
	const values = { email: 'a@b.test', password: 'abc' };
	const refuse = (error: Error) => withForm(asked(values), schema, () => Promise.reject(error));
	const beside = await refuse(new AppError('invalid', 'Taken.', { errors: [{ field: 'email', message: 'taken' }] }));
	expect(refusal(beside)?.data).toMatchObject({ errors: { email: 'Taken.' }, message: null });
	expect(refusal(await refuse(new AppError('too-many', 'Wait.')))).toMatchObject({
		status: 429,
		data: { message: 'Wait.' }
	});
	await expect(refuse(new Error('broken'))).rejects.toThrow('broken');
	expect(await withForm(asked(values), schema, (data) => Promise.resolve(data.email))).toBe('a@b.test');
});
