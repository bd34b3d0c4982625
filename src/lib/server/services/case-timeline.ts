import type { Actor } from '$lib/model/people';
import { now } from '$lib/server/config';
import { appendTimeline, findCase, listCases, type CaseRow } from '$lib/server/repositories/circle';
import type { Tx } from '$lib/server/repositories/transaction';

/** What happens on a unit is written into its case's timeline. */

type Entry = { kind: string; text: string; link?: string; at?: Date };

/** Writes one line into a case's timeline, in a person's name (or the product's own). */
export async function noteOnCase(tx: Tx, actor: Actor | null, caseId: string, entry: Entry): Promise<void> {
	const { at = now(), ...rest } = entry;
	await appendTimeline(tx, caseId, [{ at: at.toISOString(), by: actor?.name ?? null, ...rest }]);
}

/**
 * The case that work on a unit belongs to: the one that was named, or else the newest open one that concerns the
 * circuit. Null when there is none, or the named one is another unit's.
 */
export async function caseForWork(
	tx: Tx,
	unitId: string,
	circuit: string | null,
	named: string | null
): Promise<CaseRow | null> {
	if (named) {
		const row = await findCase(tx, named);
		return row?.unitId === unitId ? row : null;
	}
	const rows = await listCases(tx, [unitId]);
	return (
		rows.find(
			(row) => row.state !== 'closed' && (row.circuit === null || circuit === null || row.circuit === circuit)
		) ?? null
	);
}
