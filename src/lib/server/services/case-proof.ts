import type { Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import type { CaseProof } from '$lib/model/wire/case';
import { listChanges, type CaseRow, type ChangeRow } from '$lib/server/repositories/circle';
import { listStarts } from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { proofOf } from './proof';

/** The latest change that was made for a case, or null. */
export async function latestChangeOf(tx: Tx, row: CaseRow): Promise<ChangeRow | null> {
	return (await listChanges(tx, row.unitId)).filter((change) => change.caseId === row.id).at(-1) ?? null;
}

/** The circuit a case is about: its own, the change's, or the one that tripped most at its starts. */
async function circuitOf(tx: Tx, row: CaseRow, change: ChangeRow): Promise<string> {
	if (row.circuit ?? change.circuit) return row.circuit ?? change.circuit ?? '1';
	const trips = new Map<string, number>();
	for (const { circuit, record } of await listStarts(tx, [row.unitId], { outcome: 'tripped' }))
		if (record.startupTrip) trips.set(circuit, (trips.get(circuit) ?? 0) + 1);
	return [...trips].sort((a, b) => b[1] - a[1])[0]?.[0] ?? '1';
}

/** The proof since the latest change of a case; null before one. */
export async function proofOfCase(actor: Actor, row: CaseRow, system: UnitSystem): Promise<CaseProof | null> {
	const found = await withOrganisation(actor.organisationId, async (tx) => {
		const change = await latestChangeOf(tx, row);
		return change ? { change, circuit: await circuitOf(tx, row, change) } : null;
	});
	if (!found) return null;
	const { change, circuit } = found;
	const proof = await proofOf(actor, row.unitId, { change: change.id, circuit }, system);
	if (proof.state === 'no-change') return null;
	return {
		changeId: change.id,
		circuit,
		state: proof.state,
		e: proof.e,
		threshold: proof.threshold,
		clean: proof.after.c,
		trips: proof.after.t,
		cleanStillNeeded: proof.cleanStillNeeded,
		sentences: proof.sentences
	};
}
