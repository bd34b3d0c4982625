import { config } from '$lib/server/config';
import { join } from 'node:path';
import { folderStore } from './folder';
import { s3Store } from './s3';
import type { ObjectStore } from './types';

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
