import { followCases } from './case-following';
import { tellReopened } from './case-news';
import { tellRepeatTrips } from './repeat-trips';

/**
 * What follows a unit's analysis: cases are proved or come back, and people are told. What fails here is logged and
 * never takes the analysis back.
 */
export async function afterAnalysis(job: { organisationId: string; unitId: string }): Promise<void> {
	const steps = [
		async () => tellReopened(job.organisationId, await followCases(job)),
		async () => tellRepeatTrips(job)
	];
	for (const step of steps) await step().catch((error: unknown) => console.error('after analysis', job.unitId, error));
}
