import type { LayoutServerLoad } from './$types';

/** Guesses a phone from the request, so that the first paint has the phone's rows and nothing moves. */
export const load: LayoutServerLoad = ({ request }) => ({
	phone: /\bMobile\b|Android.+Mobile|iPhone/.test(request.headers.get('user-agent') ?? '')
});
