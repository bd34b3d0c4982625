import { objectStore } from '$lib/server/store';
import { Readable } from 'node:stream';

/** An original as a stream for an answer's body. */
export function openOriginal(key: string): ReadableStream<Uint8Array> {
	return Readable.toWeb(Readable.from(objectStore().open(key))) as ReadableStream<Uint8Array>;
}
