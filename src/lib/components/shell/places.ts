import { ROLE_NAMES, RIGHTS } from '$lib/model/people';

/** A place of the product: an entry of the top strip. */
export type Place = { href: string; label: string };

const ALL: readonly (Place & { roles?: readonly string[] })[] = [
	{ href: '/', label: 'Units' },
	{ href: '/cases', label: 'Cases' },
	{ href: '/visits', label: 'Visits' },
	{ href: '/office', label: 'Office', roles: RIGHTS.readOffice },
	{ href: '/method', label: 'Method' }
];

/** The places a role may go to. A client and a technician have no office. */
export function placesFor(role: string): Place[] {
	return ALL.filter((place) => !place.roles || place.roles.includes(role)).map(({ href, label }) => ({ href, label }));
}

/** The place an address belongs to; units and their sheets are under Units. */
export function currentPlace(pathname: string): string {
	const found = ALL.find((place) => place.href !== '/' && isUnder(pathname, place.href));
	if (found) return found.href;
	return pathname === '/' || isUnder(pathname, '/units') || isUnder(pathname, '/sites') ? '/' : '';
}

function isUnder(pathname: string, folder: string): boolean {
	return pathname === folder || pathname.startsWith(`${folder}/`);
}

/** A sheet of one unit: an entry of the unit strip. */
export type UnitSheet = { path: string; label: string };
export const UNIT_SHEETS: readonly UnitSheet[] = [
	{ path: '', label: 'Days' },
	{ path: '/starts', label: 'Starts' },
	{ path: '/nights', label: 'Nights' },
	{ path: '/season', label: 'Season' },
	{ path: '/side-by-side', label: 'Side by side' },
	{ path: '/suspects', label: 'Suspects' },
	{ path: '/checks', label: 'Checks and changes' },
	{ path: '/logs', label: 'Logs and signals' }
];

/** The sheet of `unit` an address shows, by its path; a start sheet is under Starts. */
export function currentSheet(pathname: string, unit: string): string {
	const rest = pathname.slice(`/units/${unit}`.length);
	return UNIT_SHEETS.find((sheet) => sheet.path !== '' && isUnder(rest, sheet.path))?.path ?? '';
}

/** The address of a unit's sheet, keeping the circuit. */
export function sheetHref(unit: string, path: string, circuit: string | null): string {
	return `/units/${unit}${path}${circuit ? `?circuit=${encodeURIComponent(circuit)}` : ''}`;
}

/** A role in words; an unknown one is printed as it is. */
export function roleName(role: string): string {
	return Object.hasOwn(ROLE_NAMES, role) ? ROLE_NAMES[role as keyof typeof ROLE_NAMES] : role;
}

/** The same address with one query field set, or taken away when `value` is null. */
export function withQuery(url: URL, key: string, value: string | null): string {
	const query = new URLSearchParams(url.searchParams);
	if (value === null) query.delete(key);
	else query.set(key, value);
	const text = query.toString();
	return text === '' ? url.pathname : `${url.pathname}?${text}`;
}
