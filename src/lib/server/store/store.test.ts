import { parseConfig } from '$lib/server/config';
import { randomBytes } from 'node:crypto';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import S3rver from 's3rver';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { folderStore } from './folder';
import type { ObjectStore } from './types';
import { s3Store } from './s3';

let folder = '';
let fake: S3rver | undefined;
let bucket: ObjectStore;

beforeAll(async () => {
	folder = await mkdtemp(join(tmpdir(), 'firstpull-store-'));
	fake = new S3rver({
		port: 0,
		address: '127.0.0.1',
		silent: true,
		directory: join(folder, 's3'),
		configureBuckets: [{ name: 'logs', configs: [] }]
	});
	const { port } = await fake.run();
	bucket = s3Store(
		parseConfig({
			DATABASE_URL: 'postgres://x',
			S3_ENDPOINT: `http://127.0.0.1:${port}`,
			S3_BUCKET: 'logs',
			S3_ACCESS_KEY: 'S3RVER',
			S3_SECRET_KEY: 'S3RVER'
		})
	);
});
afterAll(async () => {
	await fake?.close();
	await rm(folder, { recursive: true, force: true });
});

async function bytesOf(store: ObjectStore, key: string): Promise<Buffer> {
	const chunks: Uint8Array[] = [];
	for await (const chunk of store.open(key)) chunks.push(chunk);
	return Buffer.concat(chunks);
}

describe.each([
	['a folder', () => folderStore(join(folder, 'objects'))],
	['an S3 service', () => bucket]
])('%s', (_name, open) => {
	it('gives back, byte for byte, what it keeps', async () => {
		const store = open();
		const original = randomBytes(3_000_017);
		const path = join(folder, 'incoming');
		await writeFile(path, original);
		await store.keepFile('one/log', path);
		expect((await bytesOf(store, 'one/log')).equals(original)).toBe(true);
		await store.keep('one/small', Buffer.from('é\n'));
		expect((await bytesOf(store, 'one/small')).toString()).toBe('é\n');
		await store.remove('one/log');
		await expect(bytesOf(store, 'one/log')).rejects.toThrow();
		expect(await store.answers()).toBe(true);
	});
});

it('refuses a key that leaves the folder', async () => {
	const store = folderStore(join(folder, 'objects'));
	await expect(store.keep('../outside', Buffer.from('x'))).rejects.toThrow(RangeError);
});
