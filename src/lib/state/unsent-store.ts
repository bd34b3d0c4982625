import type { ChangeInputSent, CheckInputSent } from '$lib/model/wire/field';
import type { NotedInputSent } from '$lib/model/wire/noted';

/**
 * What a person recorded and the server has not confirmed yet, kept in the browser (IndexedDB). Everything goes through
 * here first, so nothing is lost on a bad connection, a reload or a closed page.
 */

type Common = {
	/** the client key: the server keeps one record for it, however often it is sent */
	key: string;
	unitId: string;
	unitTag: string;
	/** only this person's session sends it */
	personId: string;
	/** ms UTC */
	keptAt: number;
	/** why the server refused it; null while it only waits */
	refused: string | null;
};
export type UnsentCheck = Common & { what: 'check'; body: CheckInputSent; line: string };
export type UnsentChange = Common & { what: 'change'; body: ChangeInputSent; line: string };
export type UnsentNoted = Common & { what: 'noted'; body: NotedInputSent; line: string };
export type UnsentPhoto = Common & {
	what: 'photo';
	/** the client key of the check it belongs to */
	checkKey: string;
	picture: Blob;
	name: string;
	caption: string;
	kind: 'camera' | 'thermal' | 'sight-glass';
};
export type Unsent = UnsentCheck | UnsentChange | UnsentNoted | UnsentPhoto;

const DATABASE = 'firstpull';
const STORE = 'unsent';

function open(): Promise<IDBDatabase> {
	return new Promise((done, fail) => {
		const request = indexedDB.open(DATABASE, 1);
		request.onupgradeneeded = () => request.result.createObjectStore(STORE, { keyPath: 'key' });
		request.onsuccess = () => done(request.result);
		request.onerror = () => fail(request.error ?? new Error('the browser keeps nothing here'));
	});
}

async function inStore<T>(mode: IDBTransactionMode, work: (store: IDBObjectStore) => IDBRequest<T>): Promise<T> {
	const database = await open();
	try {
		return await new Promise<T>((done, fail) => {
			const transaction = database.transaction(STORE, mode);
			const request = work(transaction.objectStore(STORE));
			// Only a completed transaction is on disk.
			transaction.oncomplete = () => done(request.result);
			transaction.onerror = () => fail(transaction.error ?? new Error('the browser could not keep it'));
			transaction.onabort = () => fail(transaction.error ?? new Error('the browser could not keep it'));
		});
	} finally {
		database.close();
	}
}

/** Keeps an item; one with the same key is replaced. */
export async function keepUnsent(item: Unsent): Promise<void> {
	await inStore('readwrite', (store) => store.put(item));
}

export async function dropUnsent(key: string): Promise<void> {
	await inStore('readwrite', (store) => store.delete(key));
}

/** Everything kept, oldest first; checks and changes before their photos. */
export async function listUnsent(): Promise<Unsent[]> {
	const all = await inStore('readonly', (store) => store.getAll() as IDBRequest<Unsent[]>);
	const late = (item: Unsent): number => (item.what === 'photo' ? 1 : 0);
	return all.sort((a, b) => late(a) - late(b) || a.keptAt - b.keptAt);
}
