import { DEFAULT_LIMITS, LIMIT_KEYS, type LimitHistory, type LimitKey, type LimitValue } from '$lib/model/unit';
import type { Site, Unit } from '$lib/model/wire/site-unit';
import type { LimitRow, SiteRow, UnitRow } from '$lib/server/repositories/plant';

/** Rows of the store as the API and the analysis know them. */

export const siteShape = (row: SiteRow): Site => ({
	id: row.id,
	name: row.name,
	timeZone: row.timeZone,
	address: row.address,
	altitude: row.altitude,
	contacts: row.contacts,
	accessNotes: row.accessNotes,
	onCallId: row.onCallId
});

export function unitShape(unit: UnitRow, limits: readonly LimitRow[]): Unit {
	const shaped: Unit['limits'] = {};
	for (const row of limits) {
		if (row.unitId !== unit.id) continue;
		(shaped[row.key] ??= []).push({
			value: row.value,
			provenance: row.provenance,
			validFrom: row.validFrom?.toISOString() ?? null,
			...(row.note ? { note: row.note } : {})
		});
	}
	const { id, siteId, tag, refrigerant, circuits, nature, namePlate, deliveryHours } = unit;
	return { id, siteId, tag, refrigerant, circuits, nature, namePlate, deliveryHours, limits: shaped };
}

/** The limits of one unit for the analysis: this product's own choices where the unit has none. */
export function limitsOf(rows: readonly LimitRow[]): LimitHistory {
	const history: Partial<Record<LimitKey, LimitValue[]>> = {};
	for (const row of rows) {
		(history[row.key] ??= []).push({
			value: row.value,
			provenance: row.provenance,
			validFrom: row.validFrom?.getTime() ?? -Infinity
		});
	}
	for (const key of LIMIT_KEYS) history[key]?.sort((a, b) => a.validFrom - b.validFrom);
	return { ...DEFAULT_LIMITS, ...history };
}
