import type { Visit } from '$lib/model/wire/visit';
import type { CaseRow, VisitRow } from '$lib/server/repositories/circle';
import type { SiteRow, UnitRow } from '$lib/server/repositories/plant';
import { caseNumber } from './case-shapes';
import type { Names } from './check-shapes';

/** Visits as the API answers them. */

export type VisitAround = { unit: UnitRow; site: SiteRow; cases: readonly CaseRow[]; names: Names };

export function visitShape(row: VisitRow, { unit, site, cases, names }: VisitAround): Visit {
	const owner = cases.find((entry) => entry.id === row.caseId);
	return {
		id: row.id,
		unitId: row.unitId,
		unitTag: unit.tag,
		siteId: site.id,
		siteName: site.name,
		timeZone: site.timeZone,
		caseId: row.caseId,
		caseNumber: owner ? caseNumber(owner) : null,
		date: row.date,
		beThereBy: row.beThereBy,
		technician: row.technicianId ? { id: row.technicianId, name: names.get(row.technicianId) ?? 'left' } : null,
		arrivedAt: row.arrivedAt?.toISOString() ?? null,
		leftAt: row.leftAt?.toISOString() ?? null,
		purpose: row.purpose ?? '',
		accessNotes: row.accessNotes ?? site.accessNotes ?? '',
		result: row.result ?? '',
		briefSentAt: row.briefSentAt?.toISOString() ?? null,
		reportSentAt: row.report?.sentAt ?? null
	};
}
