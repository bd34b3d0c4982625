import { createReadStream } from 'node:fs';
import { copyFile, mkdir, open, rename, rm, unlink, writeFile } from 'node:fs/promises';
import { randomUUID } from 'node:crypto';
import { dirname, join, resolve, sep } from 'node:path';
import type { ObjectStore } from './types';

async function syncToDisk(path: string): Promise<void> {
	const handle = await open(path, 'r+');
	try {
		await handle.sync();
	} finally {
		await handle.close();
	}
}

/** Moves a file, across file systems too. */
async function move(from: string, to: string): Promise<void> {
	try {
		await rename(from, to);
	} catch (error) {
		if ((error as NodeJS.ErrnoException).code !== 'EXDEV') throw error;
		await copyFile(from, `${to}.part`);
		await syncToDisk(`${to}.part`);
		await rename(`${to}.part`, to);
		await unlink(from);
	}
}

/** A folder as object store: each key is a path below `base`. */
export function folderStore(base: string): ObjectStore {
	const pathOf = (key: string): string => {
		const path = resolve(base, key);
		if (!path.startsWith(resolve(base) + sep)) throw new RangeError(`the key ${key} leaves the store`);
		return path;
	};
	const ready = async (key: string): Promise<string> => {
		const path = pathOf(key);
		await mkdir(dirname(path), { recursive: true });
		return path;
	};
	return {
		async keepFile(key, from) {
			await syncToDisk(from);
			await move(from, await ready(key));
		},
		async keep(key, bytes) {
			const path = await ready(key);
			const part = `${path}.${randomUUID()}.part`;
			await writeFile(part, bytes, { flush: true });
			await rename(part, path);
		},
		open: (key) => createReadStream(pathOf(key), { highWaterMark: 256 * 1024 }),
		remove: (key) => rm(pathOf(key), { force: true }),
		async answers() {
			try {
				const probe = join(base, `.probe-${randomUUID()}`);
				await mkdir(base, { recursive: true });
				await writeFile(probe, '');
				await unlink(probe);
				return true;
			} catch {
				return false;
			}
		}
	};
}
