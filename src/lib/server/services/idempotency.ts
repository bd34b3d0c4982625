import { AppError } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { findAnswer, keepAnswer } from '$lib/server/repositories/idempotency';

/**
 * Answers an unsafe call once for its Idempotency-Key: the same call again gets the first answer.
 * Errors are not kept, so that a call that failed may be tried again.
 * @throws AppError `conflict` when the key came with another call
 */
export async function answerOnce(
	actor: Actor,
	key: string,
	request: string,
	answer: () => Promise<Response>
): Promise<Response> {
	if (key.length > 200) throw new AppError('invalid', 'The Idempotency-Key is over 200 characters.');
	const owned = `${actor.personId} ${key}`;
	const kept = await withOrganisation(actor.organisationId, (tx) => findAnswer(tx, owned));
	if (kept) {
		if (kept.request !== request) throw new AppError('conflict', 'This Idempotency-Key came with another call.');
		const headers: Record<string, string> = { 'content-type': 'application/json', 'idempotency-replayed': 'true' };
		if (kept.location) headers.location = kept.location;
		return new Response(kept.status === 204 ? null : JSON.stringify(kept.body), { status: kept.status, headers });
	}
	const response = await answer();
	if (response.status < 300) {
		const body = response.status === 204 ? null : ((await response.clone().json()) as unknown);
		const row = { key: owned, request, status: response.status, body, location: response.headers.get('location') };
		await withOrganisation(actor.organisationId, (tx) => keepAnswer(tx, actor.organisationId, row));
	}
	return response;
}
