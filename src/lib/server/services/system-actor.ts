import type { Actor } from '$lib/model/people';

/** Who acts when the product does something by itself: sees every site, is named in no person's stead. */
export const systemActor = (organisationId: string): Actor => ({
	organisationId,
	personId: '00000000-0000-0000-0000-000000000000',
	name: 'Firstpull',
	email: '',
	role: 'owner',
	siteIds: null,
	via: 'system',
	scopes: null
});
