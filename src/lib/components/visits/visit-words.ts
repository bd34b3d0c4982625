import type { Visit } from '$lib/model/wire/visit';
import { counted } from '$lib/utils/format';

/** Some dates in a row, from one on. */
export function daysFrom(date: string, count: number): string[] {
	const first = Date.parse(`${date}T12:00:00Z`);
	return Array.from({ length: count }, (_, i) => new Date(first + i * 86_400_000).toISOString().slice(0, 10));
}

/** The finding over the sheet of visits. */
export function visitsTitle(visits: readonly Visit[], today: string): string {
	const coming = visits.filter((visit) => visit.leftAt === null && visit.date >= today);
	const unsaid = coming.filter((visit) => visit.technician === null).length;
	if (coming.length === 0) return 'No visit is planned';
	if (unsaid > 0) return `${counted(coming.length, 'visit')} planned, ${unsaid} without a person`;
	return `${counted(coming.length, 'visit')} planned`;
}
