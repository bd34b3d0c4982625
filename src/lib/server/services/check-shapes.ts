import { airPressure, type UnitSystem } from '$lib/model/quantities';
import type { SuspectKey } from '$lib/model/suspect';
import { limitAt } from '$lib/model/unit';
import { READING_SCHEMAS, type Change, type Check, type CheckKind, type Photo } from '$lib/model/wire/field';
import { now } from '$lib/server/config';
import type { ChangeRow, CheckRow } from '$lib/server/repositories/circle';
import type { PhotoRow } from '$lib/server/repositories/photos';
import { listLimits, type SiteRow, type UnitRow } from '$lib/server/repositories/plant';
import type { Tx } from '$lib/server/repositories/transaction';
import { judgeCheck, type AnyCheck, type CheckUnit, type Judgement } from '$lib/utils/field-check';
import { limitsOf } from './plant-shapes';

/** Checks, changes and photos as the API answers them. */

export type Names = ReadonlyMap<string, string>;

/** What the check forms know of a unit. */
export async function checkUnitOf(tx: Tx, unit: UnitRow, site: SiteRow): Promise<CheckUnit> {
	const limits = limitsOf(await listLimits(tx, [unit.id]));
	const at = now().getTime();
	const value = (key: 'oilLevelLow' | 'oilLevelHigh' | 'pairedSensorTolerance' | 'hardSensorTolerance') =>
		limitAt(limits, key, at)?.value ?? null;
	return {
		limits: {
			oilLevelLow: value('oilLevelLow'),
			oilLevelHigh: value('oilLevelHigh'),
			pairedSensorTolerance: value('pairedSensorTolerance'),
			hardSensorTolerance: value('hardSensorTolerance')
		},
		nature: unit.nature,
		air: airPressure(site.altitude ?? 0)
	};
}

/** The judgement of a stored check. A kind or reading of an older version is only told. */
export function judgementOf(row: CheckRow, system: UnitSystem, air: number): Judgement {
	const schema = READING_SCHEMAS[row.kind as CheckKind];
	const readings = schema?.safeParse(row.readings);
	if (!readings?.success) return { result: 'told', sentence: row.verdict ?? row.note ?? row.kind, reasons: [] };
	return judgeCheck({ kind: row.kind, readings: readings.data } as AnyCheck, system, air);
}

export const photoShape = (row: PhotoRow): Photo => ({
	id: row.id,
	checkId: row.checkId,
	caption: row.caption ?? '',
	kind: row.kind as Photo['kind'],
	width: row.width,
	height: row.height,
	bytes: row.bytes,
	view: `/api/photos/${row.id}/view`,
	original: `/api/photos/${row.id}/original`,
	createdAt: row.createdAt.toISOString()
});

export function checkShape(
	row: CheckRow,
	photos: readonly PhotoRow[],
	names: Names,
	system: UnitSystem,
	air: number
): Check {
	const { result, sentence } = judgementOf(row, system, air);
	return {
		id: row.id,
		unitId: row.unitId,
		clientKey: row.clientKey,
		circuit: row.circuit,
		caseId: row.caseId,
		visitId: row.visitId,
		kind: row.kind,
		readings: row.readings,
		result,
		verdict: sentence,
		indicative: row.indicative,
		indicativeReason: row.indicativeReason,
		note: row.note ?? '',
		at: row.at.toISOString(),
		by: row.byName,
		signedAt: row.signedAt?.toISOString() ?? null,
		signedBy: row.signedBy ? (names.get(row.signedBy) ?? null) : null,
		suspect: row.suspect as SuspectKey | null,
		photos: photos.filter((photo) => photo.checkId === row.id).map(photoShape)
	};
}

export const changeShape = (row: ChangeRow): Change => ({
	id: row.id,
	unitId: row.unitId,
	clientKey: row.clientKey,
	circuit: row.circuit,
	caseId: row.caseId,
	kind: row.kind,
	text: row.text,
	limit: row.limit,
	amount: row.amount,
	amountUnit: row.amountUnit,
	certifiedPerson: row.certifiedPerson,
	aimedAt: row.aimedAt,
	splits: row.splits,
	at: row.at.toISOString(),
	by: row.byName
});
