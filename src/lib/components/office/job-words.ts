import type { Job } from '$lib/model/wire/office';

const NAMES: Readonly<Record<string, string>> = {
	'read-log': 'Read a log',
	'analyse-unit': 'Compute a unit',
	'send-mail': 'Send a message',
	'weekly-digest': 'Weekly mail',
	'late-deliveries': 'Look for late logs'
};
const STATES: Readonly<Record<string, string>> = {
	created: 'waits',
	retry: 'waits for another try',
	active: 'under way',
	completed: 'done',
	cancelled: 'called back',
	failed: 'failed'
};

/** What a job does, in words. */
export const jobName = (job: Pick<Job, 'name'>): string => NAMES[job.name] ?? job.name;
/** How far a job is, in words. */
export const jobState = (job: Pick<Job, 'state'>): string => STATES[job.state] ?? job.state;

const OPEN: readonly string[] = ['created', 'retry', 'active'];

/** Jobs by what a person looks for: failed ones first, then those under way or waiting, then the newest done. */
export function sortedJobs(jobs: readonly Job[]): { failed: Job[]; open: Job[]; done: Job[] } {
	return {
		failed: jobs.filter((job) => job.state === 'failed'),
		open: jobs.filter((job) => OPEN.includes(job.state)),
		done: jobs.filter((job) => job.state !== 'failed' && !OPEN.includes(job.state))
	};
}
