import type { Log } from '$lib/model/wire/log';
import type { Problem } from '$lib/model/wire/common';
import { ApiError } from './api';
import { IN_PARTS_FROM, sendInParts } from './upload-parts';

/** Where an upload is: on its way, waiting for a connection, in the store's hands, or refused. */
export type UploadState = 'sending' | 'waiting' | 'storing' | 'sent' | 'failed' | 'stopped';

/**
 * One upload of one or several files that make one log. Bytes are counted as the connection takes them
 * (XMLHttpRequest: fetch cannot tell), so the stroke shows what has left this device and no more. Big ones go in parts
 * and go on where a broken connection stopped them.
 */
export class Upload {
	readonly names: readonly string[];
	readonly total: number;
	/** Goes in parts. */
	readonly large: boolean;
	state = $state<UploadState>('sending');
	sent = $state(0);
	/** Bytes that an earlier try had brought already. */
	resumedFrom = $state(0);
	log: Log | null = $state(null);
	problem: Problem | null = $state(null);
	readonly #stop = new AbortController();

	constructor(unit: string, files: readonly File[], done: (upload: Upload) => void) {
		this.names = files.map((file) => file.name);
		this.total = files.reduce((sum, file) => sum + file.size, 0);
		this.large = this.total >= IN_PARTS_FROM;
		if (this.large) void this.#inParts(unit, files, done);
		else this.#inOne(unit, files, done);
	}

	/** Stops sending; what has arrived is thrown away by the server. */
	stop(): void {
		this.#stop.abort();
	}

	async #inParts(unit: string, files: readonly File[], done: (upload: Upload) => void): Promise<void> {
		const report = {
			sent: (bytes: number) => (this.sent = Math.min(bytes, this.total)),
			resumed: (bytes: number) => (this.resumedFrom = bytes),
			waiting: (waits: boolean) => (this.state = waits ? 'waiting' : 'sending'),
			storing: () => (this.state = 'storing')
		};
		try {
			this.#took(await sendInParts(unit, files, report, this.#stop.signal));
		} catch (error) {
			if (this.#stop.signal.aborted) this.state = 'stopped';
			else this.#failed(error);
		}
		done(this);
	}

	#took(log: Log): void {
		this.state = 'sent';
		this.sent = this.total;
		this.log = log;
	}

	#failed(error: unknown): void {
		this.state = 'failed';
		const title = error instanceof Error ? error.message : 'It could not be sent.';
		this.problem = error instanceof ApiError ? error.problem : { type: 'about:blank', title, status: 0 };
	}

	#inOne(unit: string, files: readonly File[], done: (upload: Upload) => void): void {
		const body = new FormData();
		for (const file of files) body.append('file', file, file.name);
		const request = new XMLHttpRequest();
		this.#stop.signal.addEventListener('abort', () => request.abort());
		request.open('POST', `/api/units/${unit}/logs?mapping=ask`);
		request.setRequestHeader('accept', 'application/json');
		request.setRequestHeader('idempotency-key', crypto.randomUUID());
		request.upload.onprogress = (event) => {
			// The form around the files counts too; the stroke ends where the files do.
			this.sent = Math.min(event.loaded, this.total);
		};
		request.upload.onload = () => {
			if (this.state === 'sending') this.state = 'storing';
		};
		request.onload = () => {
			this.#answer(request);
			done(this);
		};
		request.onerror = () => {
			this.#failed(new Error('The connection broke. Nothing was kept; send it again.'));
			done(this);
		};
		request.onabort = () => {
			this.state = 'stopped';
			done(this);
		};
		request.send(body);
	}

	#answer(request: XMLHttpRequest): void {
		const body: unknown = parse(request.responseText);
		if (request.status === 202 && typeof body === 'object' && body !== null && 'log' in body) {
			this.#took(body.log as Log);
			return;
		}
		const fallback = { type: 'about:blank', title: `The server answered ${request.status}` };
		this.#failed(new ApiError({ ...fallback, status: request.status, ...(body as Partial<Problem> | null) }));
	}
}

function parse(text: string): unknown {
	try {
		return JSON.parse(text);
	} catch {
		return null;
	}
}
