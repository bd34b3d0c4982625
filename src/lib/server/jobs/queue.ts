import { config } from '$lib/server/config';
import PgBoss from 'pg-boss';

/** Names and payloads of the jobs, and how they are put into the queue. */
export const JOBS = {
	readLog: 'read-log',
	analyseUnit: 'analyse-unit'
} as const;

export type ReadLogJob = { organisationId: string; logId: string };
export type AnalyseUnitJob = { organisationId: string; unitId: string };

let opened: Promise<PgBoss> | undefined;

async function open(): Promise<PgBoss> {
	// Its own small pool: a job waiting for work must never starve requests of connections.
	const boss = new PgBoss({
		connectionString: config().DATABASE_URL,
		max: 4,
		schema: 'queue',
		application_name: 'firstpull-queue'
	});
	boss.on('error', (error) => console.error('queue', error.message));
	await boss.start();
	await boss.createQueue(JOBS.readLog);
	// Only this policy makes a singleton key hold without a time slot: one waiting recomputation a unit, however many logs.
	await boss.createQueue(JOBS.analyseUnit, { name: JOBS.analyseUnit, policy: 'short' });
	return boss;
}

/** The process's connection to the queue. */
export function queue(): Promise<PgBoss> {
	opened ??= open();
	return opened;
}

const RETRY = { retryLimit: 3, retryDelay: 5, retryBackoff: true, expireInSeconds: 3600 };

/** Reads a log whose bytes are safe. */
export async function enqueueReading(job: ReadLogJob): Promise<void> {
	await (await queue()).send(JOBS.readLog, job, RETRY);
}

/** Recomputes a unit; asked for twice before it runs, it runs once. */
export async function enqueueAnalysis(job: AnalyseUnitJob, afterSeconds = 0): Promise<void> {
	await (await queue()).send(JOBS.analyseUnit, job, { ...RETRY, singletonKey: job.unitId, startAfter: afterSeconds });
}

/** Lets go of the queue. */
export async function closeQueue(): Promise<void> {
	const boss = await opened;
	opened = undefined;
	await boss?.stop({ graceful: true, wait: true, timeout: 5000 });
}

/** Is the queue reachable? */
export async function queueAnswers(): Promise<boolean> {
	try {
		await (await queue()).getQueueSize(JOBS.readLog);
		return true;
	} catch {
		return false;
	}
}
