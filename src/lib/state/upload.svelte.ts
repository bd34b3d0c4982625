import type { Log } from '$lib/model/wire/log';
import type { Problem } from '$lib/model/wire/common';

/** Where an upload is: on its way, in the store's hands, or refused. */
export type UploadState = 'sending' | 'storing' | 'sent' | 'failed' | 'stopped';

/**
 * One upload of one or several files that make one log. Bytes are counted as the connection takes them
 * (XMLHttpRequest: fetch cannot tell), so the stroke shows what has left this device and no more.
 */
export class Upload {
	readonly names: readonly string[];
	readonly total: number;
	state = $state<UploadState>('sending');
	sent = $state(0);
	log: Log | null = $state(null);
	problem: Problem | null = $state(null);
	readonly #request = new XMLHttpRequest();

	constructor(unit: string, files: readonly File[], done: (upload: Upload) => void) {
		this.names = files.map((file) => file.name);
		this.total = files.reduce((sum, file) => sum + file.size, 0);
		const body = new FormData();
		for (const file of files) body.append('file', file, file.name);
		const request = this.#request;
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
		request.onload = () => this.#answer(done);
		request.onerror = () => {
			this.state = 'failed';
			this.problem = {
				type: 'about:blank',
				title: 'The connection broke. Nothing was kept; send it again.',
				status: 0
			};
			done(this);
		};
		request.onabort = () => {
			this.state = 'stopped';
			done(this);
		};
		request.send(body);
	}

	/** Stops sending; what has arrived is thrown away by the server. */
	stop(): void {
		this.#request.abort();
	}

	#answer(done: (upload: Upload) => void): void {
		const body: unknown = parse(this.#request.responseText);
		if (this.#request.status === 202 && typeof body === 'object' && body !== null && 'log' in body) {
			this.state = 'sent';
			this.sent = this.total;
			this.log = body.log as Log;
		} else {
			this.state = 'failed';
			const fallback = { type: 'about:blank', title: `The server answered ${this.#request.status}` };
			this.problem = { ...fallback, status: this.#request.status, ...(body as Partial<Problem> | null) };
		}
		done(this);
	}
}

function parse(text: string): unknown {
	try {
		return JSON.parse(text);
	} catch {
		return null;
	}
}
