/** The worker process: takes jobs from the queue and gives them to threads, so that its own event loop stays free. */
import {
	JOBS,
	closeQueue,
	enqueueAnalysis,
	enqueueReading,
	queue,
	scheduleJobs,
	type AnalyseUnitJob,
	type ReadLogJob,
	type SendMailJob
} from '$lib/server/jobs/queue';
import { tellLateLogs } from '$lib/server/services/deliveries';
import { sendDigests } from '$lib/server/services/digest';
import { sendMail, sweepMails } from '$lib/server/services/mails';
import { ofEarlierMethod, unfinished } from '$lib/server/services/recovery';
import { sweepUploads } from '$lib/server/services/uploads';
import { closeDatabase } from '$lib/server/repositories/transaction';
import { fileURLToPath } from 'node:url';
import { ThreadPool } from './thread-pool';

const THREADS = Number(process.env.WORKER_THREADS ?? 2);
const SWEEP_MS = 30_000;

const pool = new ThreadPool(fileURLToPath(new URL('./read-thread.js', import.meta.url)), THREADS);

async function main(): Promise<void> {
	const boss = await queue();
	const options = { batchSize: 1, pollingIntervalSeconds: 0.5 };
	for (let i = 0; i < THREADS; i++) {
		await boss.work<ReadLogJob>(JOBS.readLog, options, async ([job]) => {
			if (job) await pool.run({ kind: JOBS.readLog, data: job.data });
		});
		await boss.work<AnalyseUnitJob>(JOBS.analyseUnit, options, async ([job]) => {
			if (job) await pool.run({ kind: JOBS.analyseUnit, data: job.data });
		});
	}
	await boss.work<SendMailJob>(JOBS.sendMail, options, async ([job]) => {
		if (job) await sendMail(job.data);
	});
	await boss.work(JOBS.digest, async () => sendDigests());
	await boss.work(JOBS.deliveries, async () => tellLateLogs());
	await scheduleJobs();
	// What a killed worker left half done is taken up again; a log that another worker holds is left alone.
	const sweep = async (): Promise<void> => {
		for (const log of await unfinished()) await enqueueReading(log);
		await sweepMails();
		await sweepUploads();
	};
	await sweepSafely(sweep);
	// After a new method version old and new figures stand side by side: every unit is computed again, one after another.
	await sweepSafely(async () => {
		for (const unit of await ofEarlierMethod()) await enqueueAnalysis(unit);
	});
	setInterval(() => void sweepSafely(sweep), SWEEP_MS).unref();
}

async function sweepSafely(sweep: () => Promise<void>): Promise<void> {
	await sweep().catch((error: unknown) => console.error('sweep', error));
}

async function stop(): Promise<void> {
	await closeQueue();
	await pool.close();
	await closeDatabase();
	process.exit(0);
}
process.on('SIGTERM', () => void stop());
process.on('SIGINT', () => void stop());

main().catch((error: unknown) => {
	console.error(error);
	process.exit(1);
});
