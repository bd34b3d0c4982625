import type { Contact, NamePlate } from '$lib/model/unit';

/** A unit as the office's sheet of sites and units needs it. */
export type PlantUnit = {
	id: string;
	siteId: string;
	tag: string;
	refrigerant: string;
	circuits: number;
	/** a log is expected at least this often, h; null: none comes by itself */
	deliveryHours: number | null;
	namePlate?: NamePlate;
	/** when the newest log came; null: none yet */
	lastAt: string | null;
	/** the next log is late by this, h; null: it is not, or none comes by itself */
	lateHours: number | null;
};
export type PlantSite = {
	id: string;
	name: string;
	onCallId: string | null;
	contacts: readonly Contact[];
	accessNotes: string | null;
};

/** How often a unit's log comes by itself. */
export const DELIVERIES = [
	{ value: '', label: 'not by itself' },
	{ value: '1', label: 'every hour' },
	{ value: '6', label: 'every 6 hours' },
	{ value: '24', label: 'every day' },
	{ value: '168', label: 'every week' }
] as const;

/** The choices, with one for what a unit has that is none of them. */
export function deliveryChoices(hours: number | null): { value: string; label: string }[] {
	const value = hours === null ? '' : String(hours);
	const known = DELIVERIES.some((choice) => choice.value === value);
	return known ? [...DELIVERIES] : [...DELIVERIES, { value, label: `every ${value} h` }];
}

/** What an import did, in one sentence. */
export function importWords({ sites, units, known }: { sites: number; units: number; known: number }): string {
	const count = (n: number, one: string): string => `${n} ${n === 1 ? one : `${one}s`}`;
	const added = sites + units === 0 ? 'Nothing new' : `${count(sites, 'site')} and ${count(units, 'unit')} added`;
	return `${added}${known > 0 ? `; ${count(known, 'unit')} there already, left alone` : ''}.`;
}
