import { AppError, notFound } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import type { Log } from '$lib/model/wire/log';
import type { Upload, UploadInput } from '$lib/model/wire/upload';
import { demand } from '$lib/server/auth/guard';
import { config, now } from '$lib/server/config';
import { sniff } from '$lib/server/ingest';
import { listOrganisations } from '$lib/server/repositories/identity';
import { withLock } from '$lib/server/repositories/logs';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import {
	deleteParts,
	deleteUpload,
	findUpload,
	insertPart,
	insertUpload,
	listExpiredUploads,
	listOpenUploads,
	listParts,
	updateUpload,
	type PartRow,
	type UploadRow
} from '$lib/server/repositories/uploads';
import { objectStore } from '$lib/server/store';
import { Readable } from 'node:stream';
import { discard, receiveFile, receivePart, safeName, SNIFF_BYTES, type IncomingFile } from './incoming';
import { logShape } from './log-shapes';
import { takeLog, visibleLog } from './logs';
import { visibleUnit } from './units';

/** Logs that come in parts: what has arrived is safe, and a broken connection goes on from there. */

/** An upload that nobody goes on with is thrown away after this. */
const KEPT_MS = 48 * 3_600_000;
/** Open uploads of one unit at a time. */
const MOST_OPEN = 20;

const expiry = (): Date => new Date(now().getTime() + KEPT_MS);
const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);

function uploadShape(row: UploadRow, parts: readonly PartRow[]): Upload {
	const files = row.files.map(({ name, bytes }, i) => ({
		name,
		bytes,
		// A log that was taken in has all of its bytes, though the parts are gone.
		received: row.logId ? bytes : sum(parts.filter((part) => part.file === i).map((part) => part.bytes))
	}));
	return {
		id: row.id,
		unitId: row.unitId,
		name: row.options.name ?? files[0]?.name ?? 'log',
		files,
		bytes: sum(files.map((file) => file.bytes)),
		received: sum(files.map((file) => file.received)),
		fingerprint: row.options.fingerprint,
		logId: row.logId,
		createdAt: row.createdAt.toISOString(),
		expiresAt: row.expiresAt.toISOString()
	};
}

/** An upload that this person began. @throws AppError `not-found` */
async function ownUpload(tx: Tx, actor: Actor, id: string): Promise<UploadRow> {
	const row = await findUpload(tx, id);
	if (row?.createdBy !== actor.personId || row.expiresAt < now()) throw notFound('upload');
	await visibleUnit(tx, actor, row.unitId);
	return row;
}

const shapeOf = async (tx: Tx, row: UploadRow): Promise<Upload> => uploadShape(row, await listParts(tx, row.id));

/**
 * Begins an upload, or gives an open one back whose fingerprint is the same.
 * @throws AppError `too-large` when the files together are over the limit of one log
 */
export async function beginUpload(
	actor: Actor,
	unitId: string,
	input: UploadInput
): Promise<{ upload: Upload; repeated: boolean }> {
	demand(actor, 'logs');
	const limit = config().UPLOAD_LIMIT;
	if (sum(input.files.map((file) => file.bytes)) > limit)
		throw new AppError('too-large', `A log may have ${Math.floor(limit / 1024 ** 2)} MiB at most.`);
	return withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		const open = (await listOpenUploads(tx, unitId)).filter((row) => row.expiresAt >= now());
		const same = input.fingerprint
			? open.find((row) => row.createdBy === actor.personId && row.options.fingerprint === input.fingerprint)
			: undefined;
		if (same) return { upload: await shapeOf(tx, same), repeated: true };
		if (open.length >= MOST_OPEN)
			throw new AppError('too-many', `${MOST_OPEN} uploads to this unit are open. Finish or give up one of them.`, {
				retryAfterSeconds: 600
			});
		const row = await insertUpload(tx, {
			organisationId: actor.organisationId,
			unitId,
			files: input.files.map(({ name, bytes }) => ({ name: safeName(name), bytes })),
			options: {
				timeZone: input.timeZone ?? null,
				mapping: input.mapping,
				name: input.name ?? null,
				fingerprint: input.fingerprint ?? null
			},
			createdBy: actor.personId,
			createdAt: now(),
			expiresAt: expiry()
		});
		return { upload: uploadShape(row, []), repeated: false };
	});
}

/** How far an upload is: only bytes that are safe count. */
export const uploadOf = (actor: Actor, id: string): Promise<Upload> =>
	withOrganisation(actor.organisationId, async (tx) => shapeOf(tx, await ownUpload(tx, actor, id)));

/** A person's open uploads to a unit, newest first. */
export async function openUploadsOf(actor: Actor, unitId: string): Promise<Upload[]> {
	return withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		const rows = (await listOpenUploads(tx, unitId)).filter(
			(row) => row.createdBy === actor.personId && row.expiresAt >= now()
		);
		const shaped: Upload[] = [];
		for (const row of rows) shaped.push(await shapeOf(tx, row));
		return shaped;
	});
}

type Place = { file: number; from: number };

/** Where the next part of a file has to begin. @throws AppError `conflict` when this one begins elsewhere */
async function nextPlace(actor: Actor, id: string, { file, from }: Place): Promise<{ row: UploadRow; left: number }> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const row = await ownUpload(tx, actor, id);
		const whole = row.files[file];
		if (!whole) throw new AppError('invalid', `The upload has no file ${file}.`);
		if (row.logId)
			throw new AppError('conflict', 'The upload is a log already.', { location: `/api/logs/${row.logId}` });
		const parts = (await listParts(tx, id)).filter((part) => part.file === file);
		const received = sum(parts.map((part) => part.bytes));
		if (from !== received)
			throw new AppError('conflict', `${received} bytes of “${whole.name}” are here: send on from there.`);
		return { row, left: whole.bytes - received };
	});
}

/**
 * Takes one part of a file. What has arrived when the connection breaks is kept; the answer, and the next look, tell
 * the bytes that are safe.
 * @throws AppError `conflict` when the part does not begin where the last one ended, `too-large` when it is longer
 * than the file was said to be, `unsupported` when the first bytes show that it is no log (then nothing is kept)
 */
export async function takePart(actor: Actor, id: string, place: Place, body: Readable): Promise<Upload> {
	demand(actor, 'logs');
	const { organisationId } = actor;
	const { row, left } = await nextPlace(actor, id, place);
	const { path, bytes } = await receivePart(body, left);
	const key = `${organisationId}/uploads/${id}/${place.file}-${place.from}`;
	try {
		if (bytes === 0) return await uploadOf(actor, id);
		await objectStore().keepFile(key, path);
	} finally {
		await discard([{ path }]);
	}
	const upload = await withOrganisation(organisationId, async (tx) => {
		const part = { organisationId, uploadId: id, file: place.file, begin: place.from, bytes, key };
		if (!(await insertPart(tx, part))) throw new AppError('conflict', 'Another part came to this place first.');
		await updateUpload(tx, id, { expiresAt: expiry() });
		return shapeOf(tx, row);
	});
	await lookAtHead(actor, row, place.file);
	return upload;
}

/** Refuses at once what a file's first bytes show to be no log. */
async function lookAtHead(actor: Actor, row: UploadRow, file: number): Promise<void> {
	const parts = await withOrganisation(actor.organisationId, (tx) => listParts(tx, row.id));
	const mine = parts.filter((part) => part.file === file);
	const whole = row.files[file];
	const received = sum(mine.map((part) => part.bytes));
	const last = mine.at(-1)?.bytes ?? 0;
	const enough = Math.min(SNIFF_BYTES, whole?.bytes ?? 0);
	// Only the part that makes the head whole is looked at: later ones change nothing.
	if (received < enough || received - last >= enough) return;
	const chunks: Uint8Array[] = [];
	let seen = 0;
	for await (const chunk of bytesOf(mine)) {
		chunks.push(chunk);
		seen += chunk.length;
		if (seen >= SNIFF_BYTES) break;
	}
	const verdict = sniff(Buffer.concat(chunks), whole?.name ?? 'log');
	if (!('refuse' in verdict)) return;
	await forget(actor.organisationId, row.id);
	throw new AppError(verdict.refuse === 413 ? 'too-large' : 'unsupported', verdict.message);
}

async function* bytesOf(parts: readonly PartRow[]): AsyncGenerator<Uint8Array> {
	for (const part of parts) yield* objectStore().open(part.key);
}

/**
 * Makes the log of a whole upload, as one that came in one piece. Asked again it gives the same log.
 * @throws AppError `conflict` while bytes are missing, or when the unit has these very bytes already
 */
export async function finishUpload(actor: Actor, id: string): Promise<Log> {
	demand(actor, 'logs');
	const { organisationId } = actor;
	const log = await withLock(`upload ${id}`, true, async () => {
		const { row, parts } = await withOrganisation(organisationId, async (tx) => {
			const own = await ownUpload(tx, actor, id);
			return { row: own, parts: await listParts(tx, id) };
		});
		const { logId } = row;
		if (logId) return withOrganisation(organisationId, async (tx) => logShape(await visibleLog(tx, actor, logId)));
		const { received, bytes } = uploadShape(row, parts);
		if (received < bytes) throw new AppError('conflict', `${bytes - received} bytes are missing still.`);
		const files = await joinedFiles(row, parts);
		const { timeZone, mapping, name } = row.options;
		try {
			const made = await takeLog(actor, row.unitId, files, { timeZone, mapping, name });
			await withOrganisation(organisationId, async (tx) => {
				await updateUpload(tx, id, { logId: made.id });
				await deleteParts(tx, id);
			});
			await removeObjects(parts);
			return made;
		} catch (error) {
			// The same bytes are here already, or the unit is gone: going on would not help.
			if (error instanceof AppError) await forget(organisationId, id);
			throw error;
		}
	});
	if (!log) throw new Error(`upload ${id} made no log`);
	return log;
}

/** The parts of each file as one, looked at and hashed like any that came in one piece. */
async function joinedFiles(row: UploadRow, parts: readonly PartRow[]): Promise<IncomingFile[]> {
	const files: IncomingFile[] = [];
	try {
		for (const [i, { name }] of row.files.entries()) {
			const mine = parts.filter((part) => part.file === i);
			files.push(await receiveFile(Readable.from(bytesOf(mine)), name));
		}
		return files;
	} catch (error) {
		await discard(files);
		throw error;
	}
}

async function removeObjects(parts: readonly PartRow[]): Promise<void> {
	for (const part of parts) await objectStore().remove(part.key);
}

async function forget(organisationId: string, id: string): Promise<void> {
	const parts = await withOrganisation(organisationId, async (tx) => {
		const found = await listParts(tx, id);
		await deleteUpload(tx, id);
		return found;
	});
	await removeObjects(parts);
}

/** Gives an upload up: nothing of it is kept. A log it became stays. */
export async function dropUpload(actor: Actor, id: string): Promise<void> {
	demand(actor, 'logs');
	await withOrganisation(actor.organisationId, (tx) => ownUpload(tx, actor, id));
	await forget(actor.organisationId, id);
}

/** Throws away what nobody went on with in time, over every organisation. */
export async function sweepUploads(): Promise<void> {
	for (const { id: organisationId } of await listOrganisations()) {
		const stale = await withOrganisation(organisationId, (tx) => listExpiredUploads(tx, now()));
		for (const row of stale) await forget(organisationId, row.id);
	}
}
