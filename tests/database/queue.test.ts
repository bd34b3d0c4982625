import { describe, expect, it } from 'vitest';
import { useFreshDatabase } from './support/fresh';

useFreshDatabase();

const ORGANISATION = '00000000-0000-4000-8000-000000000001';

describe('the queue', () => {
	it('keeps one waiting recomputation a unit however often it is asked for, but every log', async () => {
		const { enqueueAnalysis, enqueueReading, JOBS, queue } = await import('$lib/server/jobs/queue');
		for (const unitId of ['a', 'a', 'b', 'a']) await enqueueAnalysis({ organisationId: ORGANISATION, unitId });
		for (const logId of ['x', 'y']) await enqueueReading({ organisationId: ORGANISATION, logId });
		const boss = await queue();
		expect(await boss.getQueueSize(JOBS.analyseUnit)).toBe(2);
		expect(await boss.getQueueSize(JOBS.readLog)).toBe(2);
	});

	it('takes a further one while the first is at work', async () => {
		const { enqueueAnalysis, JOBS, queue } = await import('$lib/server/jobs/queue');
		const boss = await queue();
		const [job] = await boss.fetch<{ unitId: string }>(JOBS.analyseUnit);
		expect(job?.data.unitId).toBe('a');
		await enqueueAnalysis({ organisationId: ORGANISATION, unitId: 'a' });
		expect(await boss.getQueueSize(JOBS.analyseUnit)).toBe(2);
	});
});
