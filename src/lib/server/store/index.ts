import { config } from '$lib/server/config';
import { join } from 'node:path';
import { folderStore } from './folder';
import { s3Store } from './s3';

/** Where originals are kept, byte for byte: a folder by default, any S3 service by environment. */
export type ObjectStore = {
	/** Keeps the file at `path` (which is moved or copied away) under `key`; safe once the promise resolves. */
	keepFile(key: string, path: string): Promise<void>;
	/** Keeps a small object. */
	keep(key: string, bytes: Uint8Array): Promise<void>;
	/** The bytes of an object. @throws Error when there is none */
	open(key: string): AsyncIterable<Uint8Array>;
	remove(key: string): Promise<void>;
	/** Is the store reachable and writable? */
	answers(): Promise<boolean>;
};

let opened: ObjectStore | undefined;

/** The store that the settings name. */
export function objectStore(): ObjectStore {
	const { S3_ENDPOINT, S3_BUCKET, DATA_DIR } = config();
	opened ??= S3_ENDPOINT && S3_BUCKET ? s3Store(config()) : folderStore(join(DATA_DIR, 'objects'));
	return opened;
}

/** Reads a whole small object. */
export async function readObject(key: string): Promise<Uint8Array> {
	const chunks: Uint8Array[] = [];
	for await (const chunk of objectStore().open(key)) chunks.push(chunk);
	return Buffer.concat(chunks);
}
