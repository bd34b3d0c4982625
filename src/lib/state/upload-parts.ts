import type { Log } from '$lib/model/wire/log';
import type { Upload } from '$lib/model/wire/upload';
import { ApiError, getJson, problemOf, sendJson } from './api';

/** Sends big files in parts: a broken connection goes on where it stopped, after a reload of the page too. */

/** Files together over this go in parts. */
export const IN_PARTS_FROM = 8 * 1024 * 1024;
const PART = 4 * 1024 * 1024;
const LONGEST_WAIT_MS = 30_000;

export type PartsReport = {
	/** bytes that are safe in the store, and those of the part on its way */
	sent: (bytes: number) => void;
	/** bytes of an earlier try that need not be sent again */
	resumed: (bytes: number) => void;
	/** the connection is gone; true when it tries again by itself */
	waiting: (waits: boolean) => void;
	/** every byte is safe; the log is being made */
	storing: () => void;
};

/**
 * A mark of these very files: names, sizes and a hash of their ends; where the browser has no hash (a page without TLS)
 * names, sizes and times.
 */
export async function fingerprintOf(files: readonly File[]): Promise<string> {
	const plain = (file: File): string => `${file.name} ${file.size}`;
	const ends = files.flatMap((file) => [file.slice(0, 65_536), file.slice(Math.max(0, file.size - 65_536))]);
	const encode = (text: string): Uint8Array<ArrayBuffer> => new TextEncoder().encode(text);
	if (!globalThis.crypto?.subtle) {
		return shortMark(encode(files.map((file) => `${plain(file)} ${file.lastModified}`).join('\n')));
	}
	// A log's ends carry its first and last stamps: two logs of one name and size do not share both.
	const bytes = await new Blob([encode(files.map(plain).join('\n')), ...ends]).arrayBuffer();
	const hash = new Uint8Array(await crypto.subtle.digest('SHA-256', bytes));
	return [...hash].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}

/** FNV-1a, 64 bit, over the text alone. */
function shortMark(bytes: Uint8Array): string {
	let hash = 0xcbf29ce484222325n;
	for (const byte of bytes) hash = BigInt.asUintN(64, (hash ^ BigInt(byte)) * 0x100000001b3n);
	return `plain-${hash.toString(16)}`;
}

/** Is it the connection or a server in trouble, so that the same call may well work later? */
function passes(error: unknown): boolean {
	if (error instanceof ApiError) return error.status >= 500 || error.status === 429 || error.status === 0;
	return error instanceof TypeError;
}

/** Waits until the connection may be back: at the browser's word, or after a while that doubles. */
function pause(tries: number, signal: AbortSignal): Promise<void> {
	return new Promise((done) => {
		const end = (): void => {
			clearTimeout(timer);
			window.removeEventListener('online', end);
			signal.removeEventListener('abort', end);
			done();
		};
		const timer = setTimeout(end, Math.min(LONGEST_WAIT_MS, 1000 * 2 ** tries));
		window.addEventListener('online', end);
		signal.addEventListener('abort', end);
	});
}

class Sender {
	#tries = 0;
	constructor(
		readonly unit: string,
		readonly files: readonly File[],
		readonly report: PartsReport,
		readonly signal: AbortSignal
	) {}

	/** Calls until it works; what will not work by waiting is thrown. */
	async insist<T>(call: () => Promise<T>): Promise<T> {
		for (;;) {
			this.signal.throwIfAborted();
			try {
				const answer = await call();
				this.#tries = 0;
				this.report.waiting(false);
				return answer;
			} catch (error) {
				this.signal.throwIfAborted();
				if (!passes(error)) throw error;
				this.report.waiting(true);
				await pause(this.#tries++, this.signal);
			}
		}
	}

	/** One part by XMLHttpRequest: fetch cannot tell how far it is. */
	#put(upload: Upload, file: number, from: number): Promise<Upload> {
		const slice = this.files[file]?.slice(from, from + PART);
		return new Promise((done, fail) => {
			const request = new XMLHttpRequest();
			const stop = (): void => request.abort();
			this.signal.addEventListener('abort', stop);
			request.open('PUT', `/api/uploads/${upload.id}?file=${file}&from=${from}`);
			request.setRequestHeader('content-type', 'application/octet-stream');
			request.upload.onprogress = (event) => this.report.sent(upload.received + event.loaded);
			request.onerror = () => fail(new TypeError('The connection broke.'));
			request.onabort = () => fail(new DOMException('stopped', 'AbortError'));
			request.onloadend = () => this.signal.removeEventListener('abort', stop);
			request.onload = () => {
				if (request.status === 200) done(JSON.parse(request.responseText) as Upload);
				else
					void problemOf(new Response(request.responseText, { status: request.status || 503 })).then((problem) =>
						fail(new ApiError(problem))
					);
			};
			request.send(slice);
		});
	}

	async parts(begun: Upload): Promise<Upload> {
		let upload = begun;
		const look = () => this.insist(() => getJson<Upload>(fetch, `/api/uploads/${upload.id}`));
		for (let file = 0; file < this.files.length;) {
			const { bytes, received } = upload.files[file] ?? { bytes: 0, received: 0 };
			if (received >= bytes) {
				file++;
				continue;
			}
			this.signal.throwIfAborted();
			try {
				upload = await this.#put(upload, file, received);
				this.report.waiting(false);
			} catch (error) {
				this.signal.throwIfAborted();
				const elsewhere = error instanceof ApiError && error.status === 409;
				if (!elsewhere && !passes(error)) throw error;
				if (!elsewhere) {
					this.report.waiting(true);
					await pause(this.#tries++, this.signal);
				}
				// The store tells how much of the part had arrived.
				upload = await look();
			}
			this.report.sent(upload.received);
		}
		return upload;
	}
}

/**
 * Sends files as one log, in parts.
 * @throws ApiError on a refusal; an AbortError when `signal` stops it (then nothing of it is kept)
 */
export async function sendInParts(
	unit: string,
	files: readonly File[],
	report: PartsReport,
	signal: AbortSignal
): Promise<Log> {
	const sender = new Sender(unit, files, report, signal);
	const fingerprint = await fingerprintOf(files);
	const body = { files: files.map(({ name, size }) => ({ name, bytes: size })), mapping: 'ask', fingerprint };
	const begun = await sender.insist(() => sendJson<Upload>('POST', `/api/units/${unit}/uploads`, body));
	try {
		if (begun.received > 0) report.resumed(begun.received);
		report.sent(begun.received);
		const whole = await sender.parts(begun);
		report.storing();
		const { log } = await sender.insist(() => sendJson<{ log: Log }>('POST', `/api/uploads/${whole.id}/log`, {}));
		return log;
	} catch (error) {
		if (signal.aborted) await sendJson('DELETE', `/api/uploads/${begun.id}`).catch(() => undefined);
		throw error;
	}
}
