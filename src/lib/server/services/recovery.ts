import { listOrganisations } from '$lib/server/repositories/identity';
import { unfinishedLogs } from '$lib/server/repositories/logs';
import { withOrganisation } from '$lib/server/repositories/transaction';

/** Logs whose work is not done. Queuing one that is being worked on does no harm: its lock is taken. */
export async function unfinished(): Promise<{ organisationId: string; logId: string }[]> {
	const organisations = await listOrganisations();
	return unfinishedLogs(
		organisations.map((organisation) => organisation.id),
		withOrganisation
	);
}
