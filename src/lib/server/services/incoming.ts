import { AppError } from '$lib/model/errors';
import { config } from '$lib/server/config';
import { sniff } from '$lib/server/ingest';
import Busboy from '@fastify/busboy';
import { createHash, randomUUID } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { mkdir, unlink } from 'node:fs/promises';
import { join } from 'node:path';
import { Readable, Transform } from 'node:stream';
import { once } from 'node:events';
import { finished, pipeline } from 'node:stream/promises';

/** A file that has arrived, on disk beside the store until the log is taken in. */
export type IncomingFile = { name: string; path: string; bytes: number; sha256: string };

/** So many first bytes show whether a file can be a log at all. */
export const SNIFF_BYTES = 4096;

async function incomingPath(): Promise<string> {
	const folder = join(config().DATA_DIR, 'incoming');
	await mkdir(folder, { recursive: true });
	return join(folder, randomUUID());
}

/** A base name without path or control characters. */
export function safeName(name: string): string {
	const base =
		name
			.replaceAll('\\', '/')
			.split('/')
			.at(-1)
			?.replaceAll(/\p{Cc}/gu, '') ?? '';
	return base.trim().slice(0, 200) || 'log';
}

/**
 * Streams one file to disk, hashing it, and refuses at once what its first bytes already show to be no log.
 * @throws AppError `too-large` or `unsupported`; nothing is left on disk then
 */
export async function receiveFile(source: Readable, name: string): Promise<IncomingFile> {
	const path = await incomingPath();
	const hash = createHash('sha256');
	const limit = config().UPLOAD_LIMIT;
	let bytes = 0;
	let head: Buffer | null = Buffer.alloc(0);
	const look = (first: Buffer): void => {
		const seen = sniff(first, name);
		if ('refuse' in seen) throw new AppError(seen.refuse === 413 ? 'too-large' : 'unsupported', seen.message);
	};
	const count = new Transform({
		transform(chunk: Buffer, _encoding, done) {
			try {
				bytes += chunk.length;
				if (bytes > limit)
					throw new AppError('too-large', `A log may have ${Math.floor(limit / 1024 ** 2)} MiB at most.`);
				if (head) {
					head = Buffer.concat([head, chunk]);
					if (head.length >= SNIFF_BYTES) {
						look(head.subarray(0, SNIFF_BYTES));
						head = null;
					}
				}
				hash.update(chunk);
				done(null, chunk);
			} catch (error) {
				done(error as Error);
			}
		},
		flush(done) {
			try {
				if (head) look(head);
				done();
			} catch (error) {
				done(error as Error);
			}
		}
	});
	try {
		await pipeline(source, count, createWriteStream(path));
	} catch (error) {
		await unlink(path).catch(() => undefined);
		throw error;
	}
	return { name: safeName(name), path, bytes, sha256: hash.digest('hex') };
}

/**
 * Streams one part of a file to disk. A connection that breaks in the middle gives what has arrived.
 * @throws AppError `too-large` when more than `most` bytes come; nothing is left on disk then
 */
export async function receivePart(source: Readable, most: number): Promise<{ path: string; bytes: number }> {
	const path = await incomingPath();
	const out = createWriteStream(path);
	let bytes = 0;
	try {
		for await (const chunk of source as AsyncIterable<Buffer>) {
			bytes += chunk.length;
			if (bytes > most) throw new AppError('too-large', 'The part is longer than what is left of its file.');
			if (!out.write(chunk)) await once(out, 'drain');
		}
	} catch (error) {
		if (error instanceof AppError) {
			out.destroy();
			await unlink(path).catch(() => undefined);
			throw error;
		}
		// The sender is gone: what came before counts, and the next look tells it how much that is.
	}
	out.end();
	await finished(out);
	return { path, bytes };
}

/** Every file part of a multipart body, one after another. */
function receiveParts(body: Readable, contentType: string): Promise<IncomingFile[]> {
	return new Promise((done, fail) => {
		const files: Promise<IncomingFile>[] = [];
		const parser = new Busboy({ headers: { 'content-type': contentType }, limits: { files: 400 } });
		parser.on('file', (_field: string, stream: Readable, name: string) => {
			const file = receiveFile(stream, name || 'log');
			files.push(file);
			file.catch(() => stream.resume());
		});
		parser.on('filesLimit', () => fail(new AppError('too-large', 'A log may have 400 files at most.')));
		parser.on('error', (error: Error) => fail(new AppError('invalid', `The parts cannot be read: ${error.message}`)));
		parser.on('finish', () => void settle(files).then(done, fail));
		body.on('error', fail);
		body.pipe(parser);
	});
}

async function settle(files: Promise<IncomingFile>[]): Promise<IncomingFile[]> {
	const results = await Promise.allSettled(files);
	const failed = results.find((result) => result.status === 'rejected');
	const kept = results.flatMap((result) => (result.status === 'fulfilled' ? [result.value] : []));
	if (!failed) return kept;
	await discard(kept);
	throw failed.reason as Error;
}

/** Takes files off the disk that will not be kept. */
export async function discard(files: readonly { path: string }[]): Promise<void> {
	for (const file of files) await unlink(file.path).catch(() => undefined);
}

/**
 * The files of an upload's body: the body itself, or the file parts of a multipart body.
 * @throws AppError `invalid` for an empty one
 */
export async function receiveUpload(request: Request, name: string): Promise<IncomingFile[]> {
	const type = request.headers.get('content-type') ?? '';
	if (!request.body) throw new AppError('invalid', 'The upload is empty, or its Content-Type is missing.');
	const declared = Number(request.headers.get('content-length') ?? 0);
	if (declared > config().UPLOAD_LIMIT)
		throw new AppError('too-large', `A log may have ${Math.floor(config().UPLOAD_LIMIT / 1024 ** 2)} MiB at most.`);
	const body = Readable.fromWeb(request.body as Parameters<typeof Readable.fromWeb>[0]);
	const files = type.startsWith('multipart/form-data')
		? await receiveParts(body, type)
		: [await receiveFile(body, name)];
	if (files.length > 0 && files.some((file) => file.bytes > 0)) return files;
	await discard(files);
	throw new AppError('invalid', 'The upload is empty.');
}
