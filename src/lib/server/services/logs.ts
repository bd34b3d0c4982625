import { AppError, notFound } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import { isMeasureKey } from '$lib/model/quantities';
import type { Log, mappingInputSchema } from '$lib/model/wire/log';
import { demand } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { enqueueAnalysis, enqueueReading } from '$lib/server/jobs/queue';
import { recordAudit } from '$lib/server/repositories/audit';
import {
	deleteLog,
	findLog,
	findLogByHash,
	insertLog,
	listLogs,
	unitsTouchedBy,
	updateLog,
	type LogRow
} from '$lib/server/repositories/logs';
import { listUnits, raiseRevision } from '$lib/server/repositories/plant';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { objectStore } from '$lib/server/store';
import { createHash, randomUUID } from 'node:crypto';
import type { z } from 'zod';
import { discard, type IncomingFile } from './incoming';
import { logShape, type KeptInspection } from './log-shapes';
import { visibleUnit } from './units';

export type UploadOptions = { timeZone: string | null; mapping: 'auto' | 'ask'; name: string | null };

/** One hash for a log: over its files' hashes, sorted, so that the order of its parts does not matter. */
export const logHash = (hashes: readonly string[]): string =>
	createHash('sha256')
		.update([...hashes].sort().join(''))
		.digest('hex');

async function sameBytes(tx: Tx, unitId: string, sha256: string): Promise<void> {
	const taken = await findLogByHash(tx, unitId, sha256);
	if (taken)
		throw new AppError('conflict', `These bytes are here already, as “${taken.name}”.`, {
			location: `/api/logs/${taken.id}`
		});
}

/**
 * Takes in an upload: the bytes are in the object store, and the reading is queued, before this resolves.
 * @throws AppError `conflict` with the first log's address when the unit has the same bytes already
 */
export async function takeLog(
	actor: Actor,
	unitId: string,
	files: IncomingFile[],
	options: UploadOptions
): Promise<Log> {
	const { organisationId } = actor;
	try {
		demand(actor, 'logs');
		const sha256 = logHash(files.map((file) => file.sha256));
		await withOrganisation(organisationId, async (tx) => {
			await visibleUnit(tx, actor, unitId);
			await sameBytes(tx, unitId, sha256);
		});
		const id = randomUUID();
		const stored: LogRow['files'] = [];
		for (const [index, file] of files.entries()) {
			const key = `${organisationId}/logs/${id}/${index}`;
			await objectStore().keepFile(key, file.path);
			stored.push({ name: file.name, bytes: file.bytes, sha256: file.sha256, key });
		}
		const row = await withOrganisation(organisationId, async (tx) => {
			await sameBytes(tx, unitId, sha256);
			const name =
				options.name ??
				(files.length === 1 ? (files[0]?.name ?? 'log') : `${files[0]?.name ?? 'log'} and ${files.length - 1} more`);
			const log = await insertLog(tx, {
				organisationId,
				id,
				unitId,
				name: name.slice(0, 200),
				bytes: files.reduce((sum, file) => sum + file.bytes, 0),
				sha256,
				files: stored,
				options: { timeZone: options.timeZone, mapping: options.mapping, choices: {} },
				createdBy: actor.via === 'system' ? null : actor.personId,
				createdAt: now()
			});
			await recordAudit(tx, actor, {
				action: 'uploaded',
				subject: 'log',
				subjectId: id,
				after: { name: log.name, unitId, bytes: log.bytes }
			});
			return log;
		});
		await enqueueReading({ organisationId, logId: id });
		return logShape(row);
	} finally {
		await discard(files);
	}
}

/** A log's row, when this person may know of its unit. @throws AppError `not-found` */
export async function visibleLog(tx: Tx, actor: Actor, logId: string): Promise<LogRow> {
	const row = await findLog(tx, logId);
	if (!row) throw notFound('log');
	await visibleUnit(tx, actor, row.unitId).catch(() => {
		throw notFound('log');
	});
	return row;
}

/** One log. */
export const logRowOf = (actor: Actor, logId: string): Promise<LogRow> =>
	withOrganisation(actor.organisationId, (tx) => visibleLog(tx, actor, logId));

/** A unit's logs, newest first. */
export async function logsOf(actor: Actor, unitId: string): Promise<Log[]> {
	return withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		return (await listLogs(tx, unitId)).map(logShape);
	});
}

/** Takes a log away, with its samples; what it covered in other logs shows again. */
export async function removeLog(actor: Actor, logId: string): Promise<void> {
	demand(actor, 'logs');
	const { organisationId } = actor;
	const touched = await withOrganisation(organisationId, async (tx) => {
		const row = await visibleLog(tx, actor, logId);
		const units = new Set([row.unitId, ...(await unitsTouchedBy(tx, logId))]);
		await deleteLog(tx, logId);
		for (const unitId of units) await raiseRevision(tx, unitId);
		await recordAudit(tx, actor, {
			action: 'removed',
			subject: 'log',
			subjectId: logId,
			before: { name: row.name, sha256: row.sha256 }
		});
		return { units, files: row.files };
	});
	for (const file of touched.files) await objectStore().remove(file.key);
	for (const unitId of touched.units) await enqueueAnalysis({ organisationId, unitId });
}

type MappingInput = z.output<typeof mappingInputSchema>;

/**
 * Confirms or changes a log's mapping, remembers it for the header's shape, and reads the log again.
 * @throws AppError `invalid` when it names a column, unit or circuit that is not there
 */
export async function confirmMapping(actor: Actor, logId: string, input: MappingInput): Promise<Log> {
	demand(actor, 'logs');
	const { organisationId } = actor;
	const row = await withOrganisation(organisationId, async (tx) => {
		const log = await visibleLog(tx, actor, logId);
		const kept = log.inspection as KeptInspection | null;
		if (!kept) throw new AppError('conflict', 'The log has not been looked at yet. Wait until its state says so.');
		const { site } = await visibleUnit(tx, actor, log.unitId);
		const units = new Map((await listUnits(tx, site.id)).map((unit) => [unit.id, unit]));
		const mapping = mergeMapping(log, input, units);
		const choices = { ...log.options.choices, ...(input.choices ?? {}) };
		const options = { ...log.options, choices, timeZone: input.timeZone ?? log.options.timeZone };
		await updateLog(tx, logId, { mapping, options, state: 'received', progress: 0, problems: [] });
		await recordAudit(tx, actor, {
			action: 'mapped',
			subject: 'log',
			subjectId: logId,
			before: log.mapping,
			after: mapping
		});
		return { ...log, mapping, options, state: 'received' as const, progress: 0 };
	});
	await enqueueReading({ organisationId, logId });
	return logShape(row);
}

/** The stored mapping with a person's changes; every entry is confirmed then. */
function mergeMapping(
	log: LogRow,
	input: MappingInput,
	units: ReadonlyMap<string, { circuits: number }>
): Log['mapping'] {
	const entries = new Map(
		log.mapping.map((entry) => [`${entry.file}\n${entry.column}`, { ...entry, confirmed: true }])
	);
	for (const change of input.mapping) {
		const key = `${change.file}\n${change.column}`;
		const before = entries.get(key);
		if (!before) throw new AppError('invalid', `The log has no column “${change.column}” in ${change.file}.`);
		const unit = units.get(change.unitId);
		if (!unit) throw new AppError('invalid', `Column “${change.column}”: there is no such unit at this site.`);
		const circuit = change.circuit ?? before.circuit;
		if (!/^[1-4]$/.test(circuit) || Number(circuit) > unit.circuits) {
			throw new AppError('invalid', `Column “${change.column}”: the unit has no circuit ${circuit}.`);
		}
		const unitOfMeasure = change.unitOfMeasure === undefined ? before.unitOfMeasure : change.unitOfMeasure;
		if (unitOfMeasure !== null && !isMeasureKey(unitOfMeasure)) {
			throw new AppError('invalid', `Column “${change.column}”: “${unitOfMeasure}” is no unit of measure here.`);
		}
		entries.set(key, { ...before, ...change, circuit, unitOfMeasure, confidence: 1, confirmed: true });
	}
	return [...entries.values()];
}
