import { config } from '$lib/server/config';
import { lookAtFolder, watchedUnit, type Seen } from '$lib/server/services/watching';
import { createHash } from 'node:crypto';
import { mkdir, readFile, rename, stat, writeFile } from 'node:fs/promises';
import { join, resolve } from 'node:path';
import { parseArgs } from 'node:util';

/** `npm run admin -- watch`: looks at a folder again and again until it is told to stop. */

const EVERY_S = 15;
/** A file that has not changed for this long is whole. */
const REST_S = 10;

async function readSeen(file: string): Promise<Seen> {
	try {
		return JSON.parse(await readFile(file, 'utf8')) as Seen;
	} catch {
		// The first look, or a note cut off by a crash: logs are known by their bytes, so nothing is taken twice.
		return {};
	}
}

async function keepSeen(file: string, seen: Seen): Promise<void> {
	await writeFile(`${file}.new`, JSON.stringify(seen));
	await rename(`${file}.new`, file);
}

function pause(seconds: number, stop: AbortSignal): Promise<void> {
	return new Promise((done) => {
		const timer = setTimeout(done, seconds * 1000);
		stop.addEventListener('abort', () => {
			clearTimeout(timer);
			done();
		});
	});
}

function stopSignal(): AbortSignal {
	const stop = new AbortController();
	for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, () => stop.abort());
	return stop.signal;
}

/**
 * Watches a folder for a unit; with `--once` it looks once and ends, for a calendar of the machine's own.
 * A share that is gone for a while is told of and tried again.
 * @throws Error with `usage` when folder or unit are missing
 */
export async function watch(args: string[], usage: string): Promise<void> {
	const { values, positionals } = parseArgs({
		args,
		allowPositionals: true,
		options: { unit: { type: 'string' }, every: { type: 'string' }, once: { type: 'boolean', default: false } }
	});
	const [given] = positionals;
	const every = Number(values.every ?? EVERY_S);
	if (!given || !values.unit || !(every >= 1)) throw new Error(usage);
	const folder = resolve(given);
	if (!(await stat(folder)).isDirectory()) throw new Error(`${folder} is no folder.`);
	const { actor, tag } = await watchedUnit(values.unit);
	const notes = join(config().DATA_DIR, 'watch');
	await mkdir(notes, { recursive: true });
	const file = join(notes, `${createHash('sha256').update(`${values.unit} ${folder}`).digest('hex')}.json`);
	let seen = await readSeen(file);
	const stop = stopSignal();
	if (!values.once) console.log(`Watching ${folder} for ${tag}, every ${every} s. Ctrl-C ends it.`);
	while (!stop.aborted) {
		try {
			seen = await lookAtFolder({ actor, unitId: values.unit, folder, restSeconds: REST_S }, seen, console.log);
			await keepSeen(file, seen);
		} catch (error) {
			if (values.once) throw error;
			console.error(`${folder}: ${error instanceof Error ? error.message : String(error)}; it is tried again.`);
		}
		if (values.once) return;
		await pause(every, stop);
	}
}
