import { config } from '$lib/server/config';
import { Client } from 'pg';
import PgBoss from 'pg-boss';

/** Names and payloads of the jobs, and how they are put into the queue. */
export const JOBS = {
	readLog: 'read-log',
	analyseUnit: 'analyse-unit',
	sendMail: 'send-mail',
	/** once a week */
	digest: 'weekly-digest',
	/** every quarter of an hour */
	deliveries: 'late-deliveries'
} as const;

export type ReadLogJob = { organisationId: string; logId: string };
export type AnalyseUnitJob = { organisationId: string; unitId: string };
export type SendMailJob = { organisationId: string; mailId: string };

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
	await alone(async () => {
		await boss.start();
		await boss.createQueue(JOBS.readLog);
		// Only this policy makes a singleton key hold without a time slot: one waiting recomputation a unit, however many logs.
		await boss.createQueue(JOBS.analyseUnit, { name: JOBS.analyseUnit, policy: 'short' });
		for (const name of [JOBS.sendMail, JOBS.digest, JOBS.deliveries]) await boss.createQueue(name);
	});
	return boss;
}

// Any number, as long as every process that makes the queues asks for the same one.
const QUEUE_LOCK = 7_236_942;

/** Runs `work` while no other process makes the queues: each queue is a table, and two makers at once deadlock. */
async function alone(work: () => Promise<void>): Promise<void> {
	const client = new Client({ connectionString: config().DATABASE_URL, application_name: 'firstpull-queue' });
	await client.connect();
	try {
		await client.query('select pg_advisory_lock($1)', [QUEUE_LOCK]);
		await work();
	} finally {
		await client.end();
	}
}

/** The process's connection to the queue. */
export function queue(): Promise<PgBoss> {
	opened ??= open().catch((error: unknown) => {
		// The database may be on its way up: the next call tries again.
		opened = undefined;
		throw error;
	});
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

// A mail server that is down for a night is tried until it is back: 10 tries over about half a day.
const MAIL_RETRY = { retryLimit: 10, retryDelay: 30, retryBackoff: true, expireInSeconds: 120 };

/** Sends a message of the outbox. */
export async function enqueueMail(job: SendMailJob): Promise<void> {
	await (await queue()).send(JOBS.sendMail, job, MAIL_RETRY);
}

/** Puts the jobs that come round by the clock into the queue's own calendar. */
export async function scheduleJobs(): Promise<void> {
	const boss = await queue();
	await boss.schedule(JOBS.digest, '0 5 * * 1', {}, { tz: 'UTC' });
	await boss.schedule(JOBS.deliveries, '*/15 * * * *', {}, { tz: 'UTC' });
}

/** Tries a failed job once more. */
export async function retryJob(name: string, id: string): Promise<void> {
	await (await queue()).retry(name, id);
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
	} catch (error) {
		console.error('queue', error instanceof Error ? error.message : error);
		return false;
	}
}
