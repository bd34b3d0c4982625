import { getContext, setContext } from 'svelte';
import { problemOf } from './api';
import { dropUnsent, keepUnsent, listUnsent, type Unsent } from './unsent-store';

const AGAIN_MS = 15_000;
/** A connection that takes longer for one item is taken as none: a photo over a plant's thin network may need minutes. */
const MOST_MS = 240_000;

const PATHS = { check: 'checks', change: 'changes', noted: 'record' } as const;

async function post(item: Unsent): Promise<Response> {
	if (item.what === 'photo') {
		const query = new URLSearchParams({
			clientKey: item.key,
			checkKey: item.checkKey,
			caption: item.caption,
			kind: item.kind
		});
		return fetch(`/api/units/${item.unitId}/photos?${query}`, {
			method: 'POST',
			headers: { 'content-type': item.picture.type || 'application/octet-stream' },
			body: item.picture,
			signal: AbortSignal.timeout(MOST_MS)
		});
	}
	return fetch(`/api/units/${item.unitId}/${PATHS[item.what]}`, {
		method: 'POST',
		headers: { 'content-type': 'application/json' },
		body: JSON.stringify({ ...item.body, clientKey: item.key }),
		signal: AbortSignal.timeout(MOST_MS)
	});
}

/** What became of sending one item: a refusal is kept and shown, everything else that failed is tried again. */
async function sendOne(item: Unsent): Promise<'sent' | 'refused' | 'later'> {
	let answer: Response;
	try {
		answer = await post(item);
	} catch {
		return 'later';
	}
	if (answer.ok) {
		await dropUnsent(item.key);
		return 'sent';
	}
	// Signed out, too many at once, or a server in trouble: it is no fault of the item.
	if (answer.status === 401 || answer.status === 429 || answer.status >= 500) return 'later';
	const problem = await problemOf(answer);
	await keepUnsent({ ...item, refused: problem.detail ?? problem.title });
	return 'refused';
}

/** The unsent records of the person who looks: kept here first, sent when there is a connection, never doubled. */
export class UnsentRecords {
	items = $state<Unsent[]>([]);
	sending = $state(false);
	/** Counts what has been confirmed, so that a page knows to fetch again. */
	sent = $state(0);
	/** The browser cannot keep anything (private window, storage full): said before a person relies on it. */
	broken = $state<string | null>(null);
	readonly #personId: string;
	#timer: ReturnType<typeof setInterval> | undefined;

	constructor(personId: string) {
		this.#personId = personId;
	}

	/** Begins to watch the connection; gives the function that ends it. */
	watch(): () => void {
		const now = (): void => void this.send();
		window.addEventListener('online', now);
		document.addEventListener('visibilitychange', now);
		this.#timer = setInterval(() => {
			if (this.items.some((item) => item.refused === null)) now();
		}, AGAIN_MS);
		now();
		return () => {
			window.removeEventListener('online', now);
			document.removeEventListener('visibilitychange', now);
			clearInterval(this.#timer);
		};
	}

	async #look(): Promise<void> {
		try {
			this.items = (await listUnsent()).filter((item) => item.personId === this.#personId);
			this.broken = null;
		} catch (error) {
			this.broken = error instanceof Error ? error.message : 'The browser keeps nothing here.';
		}
	}

	/**
	 * Keeps records, and begins to send them; they are kept once this resolves, sent when the connection allows.
	 * @throws Error when the browser cannot keep them
	 */
	async keep(items: readonly Unsent[]): Promise<void> {
		for (const item of items) await keepUnsent(item);
		await this.#look();
		void this.send();
	}

	async drop(keys: readonly string[]): Promise<void> {
		for (const key of keys) await dropUnsent(key);
		await this.#look();
	}

	/** Sends what waits, one page at a time; refused ones only when `again`. */
	async send(again = false): Promise<void> {
		await this.#look();
		if (this.items.length === 0 || this.sending || !navigator.onLine) return;
		this.sending = true;
		try {
			await oneAtATime(async () => {
				for (const item of await listUnsent()) {
					if (item.personId !== this.#personId || (item.refused !== null && !again)) continue;
					const result = await sendOne(item);
					if (result === 'sent') this.sent++;
					// The photos of a refused check are kept with it.
					if (result === 'later') break;
				}
			});
		} finally {
			this.sending = false;
			await this.#look();
		}
	}
}

/** Two open pages do not send the same thing at once (the server would keep one of them all the same). */
async function oneAtATime(work: () => Promise<void>): Promise<void> {
	if (!('locks' in navigator)) return work();
	await navigator.locks.request('firstpull unsent', { ifAvailable: true }, async (lock) => {
		if (lock) await work();
	});
}

const KEY = Symbol('unsent');

/** Called once by the layout of the signed-in pages. */
export function setUnsent(records: UnsentRecords): UnsentRecords {
	return setContext(KEY, records);
}

/** The unsent records of the page. @throws Error outside the signed-in pages */
export function getUnsent(): UnsentRecords {
	const found = getContext<UnsentRecords | undefined>(KEY);
	if (!found) throw new Error('unsent records are known on signed-in pages only');
	return found;
}
