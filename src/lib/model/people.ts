/** The five roles of the people of an office, most rights first. */
export const ROLES = ['owner', 'manager', 'engineer', 'technician', 'client'] as const;
export type Role = (typeof ROLES)[number];

/** Least length of a password, as NIST SP 800-63B asks for where it is the only factor (from memory). */
export const LEAST_PASSWORD = 12;

export const ROLE_NAMES: Readonly<Record<Role, string>> = {
	owner: 'office owner',
	manager: 'service manager',
	engineer: 'service engineer',
	technician: 'service technician',
	client: 'client'
};

/** What a page or API call does; each needs a right. */
export const RIGHTS = {
	/** see sites, units, starts, logs */
	read: ['owner', 'manager', 'engineer', 'technician', 'client'],
	/** see suspects, proof and comparison before a check is signed */
	readSuspects: ['owner', 'manager', 'engineer', 'technician'],
	/** add logs, confirm mappings, correct starts */
	logs: ['owner', 'manager', 'engineer', 'technician'],
	/** record checks, changes, visits' results; open cases */
	field: ['owner', 'manager', 'engineer', 'technician'],
	/** sites, units, limits */
	plant: ['owner', 'manager', 'engineer'],
	/** plan visits, assign and close cases, approve reports */
	plan: ['owner', 'manager', 'engineer'],
	/** members, roles, keys, audit, export */
	office: ['owner'],
	/** see members, mail and jobs */
	readOffice: ['owner', 'manager']
} as const satisfies Record<string, readonly Role[]>;
export type Right = keyof typeof RIGHTS;

/** What an API key may do at most: reading, adding logs, or everything its role may. */
export const SCOPES = ['read', 'logs', 'write'] as const;
export type Scope = (typeof SCOPES)[number];

/** Who asks: a member of one organisation, through a session or a key. */
export type Actor = {
	organisationId: string;
	personId: string;
	name: string;
	email: string;
	role: Role;
	/** null: every site of the organisation */
	siteIds: readonly string[] | null;
	via: 'session' | 'key' | 'system';
	/** null: all that the role may */
	scopes: readonly Scope[] | null;
};

const SCOPE_OF: Readonly<Record<Right, readonly Scope[]>> = {
	read: ['read', 'logs', 'write'],
	readSuspects: ['read', 'write'],
	readOffice: ['read', 'write'],
	logs: ['logs', 'write'],
	field: ['write'],
	plant: ['write'],
	plan: ['write'],
	office: ['write']
};

/** May this person do that? */
export function may(actor: Actor, right: Right): boolean {
	const roles: readonly Role[] = RIGHTS[right];
	if (!roles.includes(actor.role)) return false;
	return actor.scopes === null || actor.scopes.some((scope) => SCOPE_OF[right].includes(scope));
}

/** May this person know of that site? */
export function maySeeSite(actor: Actor, siteId: string): boolean {
	return actor.siteIds === null || actor.siteIds.includes(siteId);
}

/** Of two roles the one with fewer rights. */
export const narrowerRole = (a: Role, b: Role): Role => (ROLES.indexOf(a) < ROLES.indexOf(b) ? b : a);

/** The sites that two grants share; null is every site. */
export function sharedSites(a: readonly string[] | null, b: readonly string[] | null): readonly string[] | null {
	if (a === null) return b;
	return b === null ? a : a.filter((id) => b.includes(id));
}

/** What a person chose for the pages. */
export type Preferences = { units: 'ip' | 'si'; paper: 'day' | 'night' | 'system' };
