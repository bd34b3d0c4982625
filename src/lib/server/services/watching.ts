import { AppError } from '$lib/model/errors';
import { now } from '$lib/server/config';
import { listOrganisations } from '$lib/server/repositories/identity';
import { findUnit } from '$lib/server/repositories/plant';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { createReadStream } from 'node:fs';
import { readdir, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { receiveFile } from './incoming';
import { takeLog } from './logs';
import { systemActor } from './system-actor';
import type { Actor } from '$lib/model/people';

/**
 * A watched folder: what a file share receives is taken in as logs of one unit. The folder is looked at, not listened
 * to, because a share tells nobody of its changes; nothing in it is moved, changed or removed.
 */

/** What a file was when it was last dealt with: it is taken again only once it is another. */
export type Seen = Record<string, { bytes: number; at: number }>;
export type Watched = { actor: Actor; unitId: string; folder: string; restSeconds: number };

/** Names of files that another program is still writing, or that are none of ours. */
const PASSED_OVER = /^[.~]|\.(tmp|part|partial|crdownload|filepart|lock|swp)$/i;

/** The unit to watch for, and who takes its logs in. @throws AppError `not-found` */
export async function watchedUnit(unitId: string): Promise<{ actor: Actor; tag: string }> {
	if (/^[0-9a-f]{8}-([0-9a-f]{4}-){3}[0-9a-f]{12}$/i.test(unitId))
		for (const { id } of await listOrganisations()) {
			const unit = await withOrganisation(id, (tx) => findUnit(tx, unitId));
			if (unit) return { actor: { ...systemActor(id), name: 'watched folder' }, tag: unit.tag };
		}
	throw new AppError('not-found', `There is no unit ${unitId}. Its id stands in the address of its page.`);
}

/** Takes one file in; says what became of it. A file that is no log is told of and left. */
async function take({ actor, unitId, folder }: Watched, name: string): Promise<string> {
	try {
		const file = await receiveFile(createReadStream(join(folder, name)), name);
		const log = await takeLog(actor, unitId, [file], { timeZone: null, mapping: 'auto', name: null });
		return `${name}: taken, /units/${unitId}/logs/${log.id}`;
	} catch (error) {
		if (!(error instanceof AppError)) throw error;
		return `${name}: ${error.kind === 'conflict' ? 'known already' : `not taken: ${error.message}`}`;
	}
}

/**
 * Looks at the folder once, in the order of names. A file that has changed within `restSeconds` is still being written
 * and waits for the next look; one that cannot be read now is tried again then.
 * @param seen what was dealt with before; given back with what is dealt with now
 * @throws Error when the folder itself cannot be read
 */
export async function lookAtFolder(watched: Watched, seen: Seen, say: (line: string) => void): Promise<Seen> {
	const names = (await readdir(watched.folder)).filter((name) => !PASSED_OVER.test(name)).sort();
	const next: Seen = {};
	for (const name of names) {
		try {
			const { size, mtimeMs, isFile } = await fileOf(join(watched.folder, name));
			if (!isFile || size === 0) continue;
			const before = seen[name];
			const same = before?.bytes === size && before.at === mtimeMs;
			if (same) next[name] = before;
			if (same || now().getTime() - mtimeMs < watched.restSeconds * 1000) continue;
			say(await take(watched, name));
			next[name] = { bytes: size, at: mtimeMs };
		} catch (error) {
			say(`${name}: cannot be read now: ${error instanceof Error ? error.message : String(error)}`);
		}
	}
	return next;
}

async function fileOf(path: string): Promise<{ size: number; mtimeMs: number; isFile: boolean }> {
	const found = await stat(path);
	return { size: found.size, mtimeMs: found.mtimeMs, isFile: found.isFile() };
}
