import type { LayoutServerLoad } from './$types';

/** Tells a phone from the width kept at the last page, or guesses it, so that the first paint has its rows and nothing moves. */
export const load: LayoutServerLoad = ({ request, cookies }) => {
	const kept = cookies.get('paper-width');
	return {
		phone: kept ? kept === 'phone' : /\bMobile\b|Android.+Mobile|iPhone/.test(request.headers.get('user-agent') ?? '')
	};
};
