/** The sheets of the office; those with `owner` are the owner's only. */
export const OFFICE_SHEETS = [
	{ href: '/office', label: 'Members' },
	{ href: '/office/plant', label: 'Sites and units' },
	{ href: '/office/keys', label: 'API keys', owner: true },
	{ href: '/office/mail', label: 'Mail' },
	{ href: '/office/jobs', label: 'Jobs' },
	{ href: '/office/audit', label: 'Audit trail', owner: true },
	{ href: '/office/settings', label: 'Settings', owner: true }
] as const;

/** The sheets a manager or an owner may open. */
export const sheetsFor = (owner: boolean): { href: string; label: string }[] =>
	OFFICE_SHEETS.filter((sheet) => owner || !('owner' in sheet)).map(({ href, label }) => ({ href, label }));
