import { AppError, notFound } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import { demand } from '$lib/server/auth/guard';
import { retryJob } from '$lib/server/jobs/queue';
import { listAudit, recordAudit } from '$lib/server/repositories/audit';
import {
	deleteOrganisation,
	findOrganisation,
	listMembers,
	renameOrganisation,
	saveSettings
} from '$lib/server/repositories/identity';
import { listLogNames } from '$lib/server/repositories/logs';
import { listSubjects } from '$lib/server/repositories/mails';
import { listJobs } from '$lib/server/repositories/office';
import { listUnits } from '$lib/server/repositories/plant';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { objectStore } from '$lib/server/store';
import { objectKeysOf } from './office-export';
import { demandPassword } from './two-step';

/** The office itself: its settings, jobs and trail, and its end. */

const JOBS_SHOWN = 300;

export type OfficeSettings = { name: string; requireTwoStep: boolean; onCallId: string | null };

async function kept(actor: Actor): Promise<OfficeSettings & { all: Record<string, unknown> }> {
	const office = await findOrganisation(actor.organisationId);
	if (!office) throw notFound('office');
	const { settings } = office;
	return {
		name: office.name,
		requireTwoStep: settings['requireTwoStep'] === true,
		onCallId: typeof settings['onCallId'] === 'string' ? settings['onCallId'] : null,
		all: settings
	};
}

/** The office's settings. */
export async function settingsOf(actor: Actor): Promise<OfficeSettings> {
	demand(actor, 'readOffice');
	const { name, requireTwoStep, onCallId } = await kept(actor);
	return { name, requireTwoStep, onCallId };
}

/** Changes them. @throws AppError `invalid` when the person on call is no member */
export async function changeSettings(actor: Actor, change: Partial<OfficeSettings>): Promise<OfficeSettings> {
	demand(actor, 'office');
	const before = await kept(actor);
	if (change.onCallId) {
		const member = (await listMembers(actor.organisationId)).find((entry) => entry.personId === change.onCallId);
		if (!member || member.leftAt || member.role === 'client')
			throw new AppError('invalid', 'The person on call is no member here.', {
				errors: [{ field: 'onCallId', message: 'not a member' }]
			});
	}
	const { name, ...settings } = change;
	if (name) await renameOrganisation(actor.organisationId, name);
	await saveSettings(actor.organisationId, { ...before.all, ...settings });
	const { all: _all, ...plain } = before;
	await withOrganisation(actor.organisationId, (tx) =>
		recordAudit(tx, actor, { action: 'changed', subject: 'office', before: plain, after: change })
	);
	return settingsOf(actor);
}

/** The audit trail, newest first; lines before one when given. */
export async function auditOf(actor: Actor, query: { limit: number; before?: number | undefined }) {
	demand(actor, 'office');
	const rows = await withOrganisation(actor.organisationId, (tx) => listAudit(tx, query.limit, query.before));
	return rows.map(({ id, at, byName, action, subject, subjectId, before, after }) => ({
		id,
		at: at.toISOString(),
		by: byName,
		action,
		subject,
		subjectId,
		before: before ?? null,
		after: after ?? null
	}));
}

/** Jobs of the office, newest first, each with the log, unit or message it is about. */
export async function jobsOf(actor: Actor) {
	demand(actor, 'readOffice');
	const jobs = await listJobs(actor.organisationId, JOBS_SHOWN);
	const idsOf = (field: string): string[] =>
		jobs.flatMap(({ data }) => (typeof data[field] === 'string' ? data[field] : []));
	return withOrganisation(actor.organisationId, async (tx) => {
		const logs = await listLogNames(tx, idsOf('logId'));
		const units = new Map((await listUnits(tx)).map((unit) => [unit.id, unit.tag]));
		const mails = await listSubjects(tx, idsOf('mailId'));
		return jobs.map((job) => {
			const log = logs.get(String(job.data['logId']));
			const unitId = log?.unitId ?? (typeof job.data['unitId'] === 'string' ? job.data['unitId'] : null);
			const about = [log?.name, unitId && units.get(unitId), mails.get(String(job.data['mailId']))];
			return { ...job, about: about.filter(Boolean).join(', ') || null, unitId };
		});
	});
}

/** Tries a failed job again. @throws AppError `not-found` when it is not this office's, or did not fail */
export async function retryOfficeJob(actor: Actor, id: string): Promise<void> {
	demand(actor, 'readOffice');
	const job = (await listJobs(actor.organisationId, 5000)).find((row) => row.id === id);
	if (job?.state !== 'failed') throw notFound('failed job');
	await retryJob(job.name, id);
}

/** Takes the office away with everything in it. @throws AppError `invalid` unless its name and the password are given */
export async function endOffice(actor: Actor, input: { name: string; password: string }): Promise<void> {
	demand(actor, 'office');
	await demandPassword(actor, input.password);
	const { name } = await kept(actor);
	if (input.name !== name)
		throw new AppError('invalid', 'Write the office’s name exactly as it is.', {
			errors: [{ field: 'name', message: 'another name' }]
		});
	const keys = await objectKeysOf(actor.organisationId);
	await deleteOrganisation(actor.organisationId);
	// The rows are gone; an object that cannot be removed now is named for whoever looks after the store.
	for (const key of keys)
		await objectStore()
			.remove(key)
			.catch((error: unknown) => console.error('an object of an ended office stays', key, error));
}
