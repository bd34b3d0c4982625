import type { ChangeFact, FieldCheckFact } from '$lib/model/checks';
import { listChanges, listChecks, type ChangeRow, type CheckRow } from '$lib/server/repositories/circle';
import type { Tx } from '$lib/server/repositories/transaction';

/** Field checks and changes of a unit as the analysis knows them. */

/** A flow that the unit's curve does not give is no flow for the analysis. */
const says = (row: CheckRow): boolean => row.kind !== 'water-flow' || typeof row.readings['flow'] === 'number';

function checkFact(row: CheckRow): FieldCheckFact {
	const readings = row.readings as Record<string, never>;
	// The readings were validated against the form of their kind when they were taken in (model/wire/field.ts).
	return {
		...readings,
		kind: row.kind,
		at: row.at.getTime(),
		indicative: row.indicative,
		signed: row.signedAt !== null
	} as unknown as FieldCheckFact;
}

const changeFact = (row: ChangeRow): ChangeFact => ({
	id: row.id,
	at: row.at.getTime(),
	text: row.text,
	aimedAt: row.aimedAt,
	newHistory: row.splits
});

/** Gives, for a circuit, what was checked and changed on it or on the whole unit. */
export async function factsOf(
	tx: Tx,
	unitId: string
): Promise<(circuit: string) => { checks: FieldCheckFact[]; changes: ChangeFact[] }> {
	const checks = await listChecks(tx, unitId);
	const changes = await listChanges(tx, unitId);
	const concerns = (row: { circuit: string | null }, circuit: string): boolean =>
		row.circuit === null || row.circuit === circuit;
	return (circuit) => ({
		checks: checks.filter((row) => concerns(row, circuit) && says(row)).map(checkFact),
		changes: changes.filter((row) => concerns(row, circuit)).map(changeFact)
	});
}
