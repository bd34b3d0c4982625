import { AppError } from '$lib/model/errors';
import { beginJourney, hasProvider } from '$lib/server/services/provider-sign-in';
import { JOURNEY_COOKIE, journeyCookie } from '$lib/server/web/cookies';
import { ownPath } from '$lib/server/web/own-path';
import { error, redirect } from '@sveltejs/kit';

/** Sends the browser to the identity provider. */
export const GET = async ({ url, cookies }) => {
	if (!hasProvider()) error(404, 'There is no identity provider here.');
	const back = `${url.origin}/sign-in/callback`;
	const begun = await beginJourney(back, ownPath(url.searchParams.get('next'))).catch((failure: unknown) => {
		if (!(failure instanceof AppError)) throw failure;
		redirect(303, '/sign-in?said=silent');
	});
	cookies.set(JOURNEY_COOKIE, JSON.stringify(begun.journey), journeyCookie(url));
	redirect(303, begun.url.href);
};
