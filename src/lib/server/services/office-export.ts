import type { Actor } from '$lib/model/people';
import { demand } from '$lib/server/auth/guard';
import { config } from '$lib/server/config';
import { recordAudit } from '$lib/server/repositories/audit';
import { findOrganisation, listMembers } from '$lib/server/repositories/identity';
import { listLogs } from '$lib/server/repositories/logs';
import { dumpTable, listLooseKeys, tenantTables } from '$lib/server/repositories/office';
import { listPhotos } from '$lib/server/repositories/photos';
import { listUnits } from '$lib/server/repositories/plant';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { objectStore } from '$lib/server/store';
import { strToU8 } from 'fflate';
import { createReadStream, createWriteStream } from 'node:fs';
import { mkdir, mkdtemp, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { withoutToken } from './mails';
import { zipStream, type ZipEntry } from './zip-stream';

/** Everything an office has, as one zip: its tables as JSON lines, the logs and photos byte for byte. */

const READ_ME = `Everything of one office.
tables/*.jsonl   one row of a table a line
members.json     people, without their passwords
logs/            the logs as they came, by unit and log
photos/          the photos as they came
Samples are not here: they come back when the logs are read again.
`;

const safe = (name: string): string => name.replaceAll(/[^\p{L}\p{N}._ -]/gu, '_').slice(0, 120);

function textFile(path: string, text: string): ZipEntry {
	async function* once(): AsyncGenerator<Uint8Array> {
		yield strToU8(text);
	}
	return { path, chunks: once, packed: false };
}

/** Writes every table to a file of its own: a stream must not hold a transaction open for as long as it is read. */
async function spoolTables(tx: Tx, folder: string): Promise<ZipEntry[]> {
	const entries: ZipEntry[] = [];
	for (const table of await tenantTables(tx)) {
		const path = join(folder, table);
		async function* lines(): AsyncGenerator<string> {
			// A link that lets somebody in is for its receiver alone, also while its message waits.
			for await (const rows of dumpTable(tx, table))
				yield `${(table === 'mails' ? rows.map(withoutToken) : rows).join('\n')}\n`;
		}
		await pipeline(Readable.from(lines()), createWriteStream(path));
		entries.push({ path: `tables/${table}.jsonl`, chunks: () => createReadStream(path), packed: false });
	}
	return entries;
}

async function originals(tx: Tx): Promise<ZipEntry[]> {
	const entries: ZipEntry[] = [];
	for (const unit of await listUnits(tx)) {
		const folder = `${safe(unit.tag)}-${unit.id.slice(0, 8)}`;
		for (const log of await listLogs(tx, unit.id))
			for (const [i, file] of log.files.entries())
				entries.push({
					path: `logs/${folder}/${log.id.slice(0, 8)}-${i}-${safe(file.name)}`,
					chunks: () => objectStore().open(file.key),
					packed: /\.(gz|zip|xlsx)$/i.test(file.name)
				});
		for (const photo of await listPhotos(tx, unit.id))
			entries.push({
				path: `photos/${folder}/${photo.id}.${photo.originalKey.split('.').at(-1) ?? 'bin'}`,
				chunks: () => objectStore().open(photo.originalKey),
				packed: true
			});
	}
	return entries;
}

async function aboutOffice(organisationId: string): Promise<ZipEntry[]> {
	const office = await findOrganisation(organisationId);
	const members = (await listMembers(organisationId)).map(({ personId, name, email, role, siteIds, leftAt }) => ({
		id: personId,
		name,
		email,
		role,
		siteIds,
		leftAt
	}));
	return [
		textFile('READ-ME.txt', READ_ME),
		textFile('office.json', JSON.stringify({ name: office?.name, settings: office?.settings }, null, '\t')),
		textFile('members.json', JSON.stringify(members, null, '\t'))
	];
}

/** The zip as a stream: memory does not grow with the office. @throws AppError `forbidden` */
export async function exportOffice(actor: Actor): Promise<ReadableStream<Uint8Array>> {
	demand(actor, 'office');
	const { organisationId } = actor;
	await mkdir(config().DATA_DIR, { recursive: true });
	const folder = await mkdtemp(join(config().DATA_DIR, 'export-'));
	const clean = (): Promise<void> => rm(folder, { recursive: true, force: true });
	try {
		const about = await aboutOffice(organisationId);
		const rest = await withOrganisation(organisationId, async (tx) => [
			...(await spoolTables(tx, folder)),
			...(await originals(tx))
		]);
		await withOrganisation(organisationId, (tx) => recordAudit(tx, actor, { action: 'exported', subject: 'office' }));
		return zipStream([...about, ...rest], clean);
	} catch (error) {
		await clean();
		throw error;
	}
}

/** Keys of everything an office keeps in the object store. */
export async function objectKeysOf(organisationId: string): Promise<string[]> {
	return withOrganisation(organisationId, async (tx) => {
		const keys = await listLooseKeys(tx);
		for (const unit of await listUnits(tx)) {
			for (const log of await listLogs(tx, unit.id)) keys.push(...log.files.map((file) => file.key));
			for (const photo of await listPhotos(tx, unit.id)) keys.push(photo.originalKey, photo.viewKey);
		}
		return keys;
	});
}
