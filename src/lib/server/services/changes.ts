import { AppError } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import type { Balance, Change, ChangeInput, ChangeKind } from '$lib/model/wire/field';
import { demand } from '$lib/server/auth/guard';
import { enqueueAnalysis } from '$lib/server/jobs/queue';
import { recordAudit } from '$lib/server/repositories/audit';
import { insertChange, listChanges, updateCase, type ChangeRow } from '$lib/server/repositories/circle';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { caseForWork, noteOnCase } from './case-timeline';
import { changeShape } from './check-shapes';
import { circuitFits, happenedAt } from './checks';
import { visibleUnit } from './units';

/** Changes on a unit: each splits its starts into before and after. */

const AMOUNT_UNITS: Partial<Record<ChangeKind, string>> = { oil: 'L', refrigerant: 'kg' };
/** After these the history before is another machine's. */
const NEW_HISTORY: ReadonlySet<ChangeKind> = new Set(['compressor', 'controller']);

function balanceOf(rows: readonly ChangeRow[], kind: ChangeKind): Balance {
	const amounts = rows.flatMap((row) => (row.kind === kind && row.amount !== null ? [row.amount] : []));
	const sum = (wanted: (amount: number) => boolean): number =>
		amounts.filter(wanted).reduce((total, amount) => total + amount, 0);
	return {
		unit: AMOUNT_UNITS[kind] ?? '',
		added: sum((amount) => amount > 0),
		removed: -sum((amount) => amount < 0),
		net: sum(() => true),
		times: amounts.length
	};
}

/** A unit's changes, oldest first, with the running balance of oil and refrigerant. */
export async function changesOf(
	actor: Actor,
	unitId: string
): Promise<{ changes: Change[]; oil: Balance; refrigerant: Balance }> {
	return withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		const rows = await listChanges(tx, unitId);
		return {
			changes: rows.map(changeShape),
			oil: balanceOf(rows, 'oil'),
			refrigerant: balanceOf(rows, 'refrigerant')
		};
	});
}

/**
 * Records a change; the starts before and after it are compared from then on, and its case waits for the proof.
 * The same client key again gives the first one back and changes nothing.
 */
export async function recordChange(
	actor: Actor,
	unitId: string,
	input: ChangeInput
): Promise<{ change: Change; repeated: boolean }> {
	demand(actor, 'field');
	const at = happenedAt(input.at);
	const result = await withOrganisation(actor.organisationId, async (tx) => {
		const { unit } = await visibleUnit(tx, actor, unitId);
		circuitFits(input.circuit, unit);
		const owner = await caseForWork(tx, unitId, input.circuit, input.caseId);
		const { row, repeated } = await insertChange(tx, {
			organisationId: actor.organisationId,
			clientKey: input.clientKey ?? null,
			unitId,
			circuit: input.circuit,
			caseId: owner?.id ?? null,
			kind: input.kind,
			text: input.text,
			limit: input.limit,
			amount: input.amount,
			amountUnit: AMOUNT_UNITS[input.kind] ?? null,
			certifiedPerson: input.certifiedPerson,
			aimedAt: input.aimedAt,
			splits: input.splits || NEW_HISTORY.has(input.kind),
			at,
			by: actor.personId,
			byName: actor.name
		});
		if (row.unitId !== unitId) throw new AppError('conflict', 'This client key came with a change of another unit.');
		if (!repeated) {
			await recordAudit(tx, actor, { action: 'added', subject: 'change', subjectId: row.id, after: input });
			if (owner) {
				await noteOnCase(tx, actor, owner.id, {
					kind: 'change',
					text: row.text,
					link: `/units/${unitId}/checks#${row.id}`,
					at
				});
				await updateCase(tx, owner.id, { state: 'changed', watchFrom: at, closedAt: null, closeReason: null });
			}
		}
		return { change: changeShape(row), repeated };
	});
	if (!result.repeated) await enqueueAnalysis({ organisationId: actor.organisationId, unitId });
	return result;
}
