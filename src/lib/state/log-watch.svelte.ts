import type { Log } from '$lib/model/wire/log';

/** Is nothing more to come without a person? */
export function isStill(state: Log['state']): boolean {
	return state === 'ready' || state === 'needs-mapping' || state === 'refused';
}

/**
 * Follows a log while it is read: server-sent events until it is ready, asks, or is refused. The share and the rows
 * are the server's own count of what is committed, so they stand still when the reader does.
 */
export class LogWatch {
	log = $state.raw<Log>() as Log;
	/** Seconds left, from how fast the share grew since watching began; null until that can be told. */
	secondsLeft: number | null = $state(null);
	#source: EventSource | null = null;
	#began: { at: number; share: number } | null = null;

	constructor(log: Log, changed: (log: Log) => void) {
		this.log = log;
		if (isStill(log.state)) return;
		this.#source = new EventSource(`/api/logs/${log.id}/progress`);
		this.#source.onmessage = (event: MessageEvent<string>) => this.#take(JSON.parse(event.data) as Log, changed);
	}

	#take(log: Log, changed: (log: Log) => void): void {
		this.log = log;
		const now = performance.now();
		if (log.state === 'reading') {
			this.#began ??= { at: now, share: log.progress };
			const grown = log.progress - this.#began.share;
			const seconds = (now - this.#began.at) / 1000;
			this.secondsLeft = grown > 0.02 && seconds > 1 ? ((1 - log.progress) * seconds) / grown : null;
		} else this.secondsLeft = null;
		if (!isStill(log.state)) return;
		this.close();
		changed(log);
	}

	/** Ends the watching; a page that goes away calls it. */
	close(): void {
		this.#source?.close();
		this.#source = null;
	}
}
