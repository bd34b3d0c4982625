import { AppError, notFound } from '$lib/model/errors';
import { may, maySeeSite, type Actor, type Right } from '$lib/model/people';

/**
 * Stops a request that lacks a right.
 * @throws AppError `forbidden`
 */
export function demand(actor: Actor, right: Right): void {
	if (may(actor, right)) return;
	const whose = actor.via === 'key' ? 'This key' : `A ${actor.role}`;
	throw new AppError('forbidden', `${whose} may not do this.`);
}

/**
 * Stops a request for a site this person may not know of; the answer is the same as for one that is not there.
 * @throws AppError `not-found`
 */
export function demandSite(actor: Actor, siteId: string, what: string): void {
	if (!maySeeSite(actor, siteId)) throw notFound(what);
}
