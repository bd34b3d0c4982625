import type { Actor, Role } from '$lib/model/people';

/** An invented office with one site and one unit, and a member of each role. */
export type Office = {
	organisationId: string;
	siteId: string;
	otherSiteId: string;
	unitId: string;
	owner: Actor;
	manager: Actor;
	engineer: Actor;
	technician: Actor;
	client: Actor;
};

export const PASSWORD = 'a long enough one';

export async function invitedOffice(name = 'Office'): Promise<Office> {
	const { actorFor, addMember, foundOrganisation } = await import('$lib/server/services/people');
	const { addSite } = await import('$lib/server/services/sites');
	const { addUnit } = await import('$lib/server/services/units');
	const tag = name.toLowerCase();
	const address = (role: string): string => `${role}@${tag}.test`;
	const { organisationId } = await foundOrganisation(name, {
		email: address('owner'),
		name: 'Owner',
		password: PASSWORD
	});
	const owner = await actorFor(address('owner'));
	const site = await addSite(owner, { name: 'Hall A', timeZone: 'Europe/Berlin', altitude: 0 });
	const other = await addSite(owner, { name: 'Hall B', timeZone: 'America/Chicago' });
	const unit = await addUnit(owner, {
		siteId: site.id,
		tag: 'U 1',
		refrigerant: 'R-134a',
		circuits: 2,
		nature: { compressor: 'screw', slideActuation: 'oil-both-ways', designEvapFlow: 40 },
		limits: { oilLevelLow: 100, oilLevelHigh: 220 }
	});
	const member = async (role: Role, siteIds: string[] | null): Promise<Actor> => {
		await addMember(organisationId, { email: address(role), name: role, password: PASSWORD, role, siteIds });
		return actorFor(address(role));
	};
	return {
		organisationId,
		siteId: site.id,
		otherSiteId: other.id,
		unitId: unit.id,
		owner,
		manager: await member('manager', null),
		engineer: await member('engineer', null),
		technician: await member('technician', null),
		client: await member('client', [site.id])
	};
}
