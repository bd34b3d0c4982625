import { closeQueue, queueAnswers } from '$lib/server/jobs/queue';
import { closeDatabase, databaseAnswers } from '$lib/server/repositories/transaction';
import { objectStore } from '$lib/server/store';

/** Which of the parts a request needs are reachable. */
export async function readiness(): Promise<{ database: boolean; store: boolean; queue: boolean }> {
	const [database, store, queue] = await Promise.all([databaseAnswers(), objectStore().answers(), queueAnswers()]);
	return { database, store, queue };
}

/** Lets go of queue and database when the process has served its last request. */
export async function letGo(): Promise<void> {
	await closeQueue();
	await closeDatabase();
}
