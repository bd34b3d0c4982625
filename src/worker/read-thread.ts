/** A thread of the worker: reads logs and analyses units, with its own connections. */
import { enqueueAnalysis, JOBS, type AnalyseUnitJob, type ReadLogJob } from '$lib/server/jobs/queue';
import { afterAnalysis } from '$lib/server/services/after-analysis';
import { moreLogsComing, runAnalysis } from '$lib/server/services/analysing';
import { runReading } from '$lib/server/services/reading';
import { parentPort } from 'node:worker_threads';

const SOON_SECONDS = 4;

type Task = { kind: typeof JOBS.readLog; data: ReadLogJob } | { kind: typeof JOBS.analyseUnit; data: AnalyseUnitJob };

async function analyse(job: AnalyseUnitJob): Promise<void> {
	await runAnalysis(job);
	await afterAnalysis(job);
}

async function work(task: Task): Promise<void> {
	if (task.kind === JOBS.analyseUnit) return analyse(task.data);
	const { organisationId } = task.data;
	for (const unitId of (await runReading(task.data)) ?? []) {
		// While more logs of the unit are on their way, one analysis soon serves them all.
		if (await moreLogsComing(organisationId, unitId)) await enqueueAnalysis({ organisationId, unitId }, SOON_SECONDS);
		else await analyse({ organisationId, unitId });
	}
}

/** A failed query's message holds all its values: the reason stands in its cause, and the rest is cut. */
function shortly(error: unknown): string {
	if (!(error instanceof Error)) return String(error);
	const reason = error.cause instanceof Error ? `${error.cause.message}; ` : '';
	const where = error.stack?.split('\n').find((line) => line.includes(' at ')) ?? '';
	return `${reason}${error.message.slice(0, 300)}${where}`;
}

const port = parentPort;
if (!port) throw new Error('read-thread runs as a thread of the worker');
port.on('message', (task: Task) => {
	work(task).then(
		() => port.postMessage({ error: null }),
		(error: unknown) => {
			const message = shortly(error);
			console.error(task.kind, message);
			port.postMessage({ error: message });
		}
	);
});
