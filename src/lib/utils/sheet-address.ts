import type { TimeWindow } from './paper-scale';

/** What a start sheet's address restores besides the start itself. */
export type SheetAddress = {
	/** null: the home view at two paper speeds */
	window: TimeWindow | null;
	/** seconds from the start; null: the sheet chooses */
	cursor: number | null;
	/** id of the held start underneath, `none`, or null: the sheet chooses */
	ghost: string | null;
	/** further starts on the same axis */
	with: string[];
};

const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

function seconds(text: string | null): number | null {
	if (text === null || text.trim() === '') return null;
	const value = Number(text);
	return Number.isFinite(value) ? value : null;
}

/** Reads `from`, `to`, `at`, `ghost` and `with` of an address; what does not make sense is left out. */
export function readSheetAddress(query: URLSearchParams): SheetAddress {
	const from = seconds(query.get('from'));
	const to = seconds(query.get('to'));
	const ghost = query.get('ghost');
	return {
		window: from !== null && to !== null && from < to ? { from, to } : null,
		cursor: seconds(query.get('at')),
		ghost: ghost !== null && (ghost === 'none' || UUID.test(ghost)) ? ghost : null,
		with: query
			.getAll('with')
			.flatMap((part) => part.split(','))
			.filter((id) => UUID.test(id))
	};
}

/** Writes the view into a query, leaving its other parts (circuit, filters) as they are. */
export function writeSheetAddress(query: URLSearchParams, address: SheetAddress): URLSearchParams {
	const next = new URLSearchParams(query);
	for (const key of ['from', 'to', 'at', 'ghost', 'with']) next.delete(key);
	const tenth = (value: number) => String(Math.round(value * 10) / 10);
	if (address.window !== null) {
		next.set('from', tenth(address.window.from));
		next.set('to', tenth(address.window.to));
	}
	if (address.cursor !== null) next.set('at', tenth(address.cursor));
	if (address.ghost !== null) next.set('ghost', address.ghost);
	if (address.with.length > 0) next.set('with', address.with.join(','));
	return next;
}
