import { followCases } from './case-following';

/**
 * What follows a unit's analysis: cases are proved or come back, and people are told. What fails here is logged and
 * never takes the analysis back.
 */
export async function afterAnalysis(job: { organisationId: string; unitId: string }): Promise<void> {
	try {
		await followCases(job);
	} catch (error) {
		console.error('after analysis', job.unitId, error);
	}
}
