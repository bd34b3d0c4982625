import { METHOD_VERSION } from '$lib/model/circuit-input';
import { listOrganisations } from '$lib/server/repositories/identity';
import { unfinishedLogs } from '$lib/server/repositories/logs';
import { staleUnits } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';

/** Logs whose work is not done. Queuing one that is being worked on does no harm: its lock is taken. */
export async function unfinished(): Promise<{ organisationId: string; logId: string }[]> {
	const organisations = await listOrganisations();
	return unfinishedLogs(
		organisations.map((organisation) => organisation.id),
		withOrganisation
	);
}

/** Units whose results an earlier method version made: they are recomputed once the program has been replaced. */
export async function ofEarlierMethod(): Promise<{ organisationId: string; unitId: string }[]> {
	const found: { organisationId: string; unitId: string }[] = [];
	for (const { id } of await listOrganisations()) {
		const units = await withOrganisation(id, (tx) => staleUnits(tx, METHOD_VERSION));
		found.push(...units.map((unitId) => ({ organisationId: id, unitId })));
	}
	return found;
}
