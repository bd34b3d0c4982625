import { mkdir, mkdtemp, rm, utimes, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { knownCases } from '../../fixtures/known/index';
import { useFreshDatabase } from './support/fresh';
import { invitedOffice, type Office } from './support/office';

// An invented office and share.
useFreshDatabase();
let office: Office;
let folder = '';
const CSV = knownCases()[0]?.csv ?? '';
const LONG_AGO = new Date(Date.now() - 3_600_000);

beforeAll(async () => {
	office = await invitedOffice();
	folder = await mkdtemp(join(tmpdir(), 'firstpull-share-'));
});
afterAll(() => rm(folder, { recursive: true, force: true }));

async function put(name: string, text: string, at: Date = LONG_AGO): Promise<void> {
	await writeFile(join(folder, name), text, 'latin1');
	await utimes(join(folder, name), at, at);
}
async function names(): Promise<string[]> {
	const { logsOf } = await import('$lib/server/services/logs');
	return (await logsOf(office.owner, office.unitId)).map((log) => log.name).sort();
}

it('takes every file of a share once, in rest, and says what it left', async () => {
	const { lookAtFolder, watchedUnit } = await import('$lib/server/services/watching');
	const { actor, tag } = await watchedUnit(office.unitId);
	expect(tag).toBe('U 1');
	const watched = { actor, unitId: office.unitId, folder, restSeconds: 10 };
	const said: string[] = [];
	const look = (seen = {}) => lookAtFolder(watched, seen, (line) => said.push(line));
	await put('a.csv', CSV);
	await put('picture.png', '\x89PNG\r\n\x1a\n no log');
	await put('half.csv.part', CSV);
	await put('.hidden.csv', CSV);
	await put('empty.csv', '');
	await put('growing.csv', CSV.slice(0, 400), new Date());
	await mkdir(join(folder, 'old'));
	let seen = await look();
	expect(await names()).toEqual(['a.csv']);
	expect(said.map((line) => line.split(':')[0])).toEqual(['a.csv', 'picture.png']);
	expect(said[1]).toContain('not taken');

	said.length = 0;
	seen = await look(seen);
	expect(said).toEqual([]);
	// A watch that forgot everything finds its logs known by their bytes.
	await look();
	expect(said.find((line) => line.startsWith('a.csv'))).toContain('known already');
	expect(await names()).toEqual(['a.csv']);

	said.length = 0;
	await put('growing.csv', CSV.slice(0, 600));
	await put('a.csv', `${CSV}\n`);
	await look(seen);
	expect(await names()).toEqual(['a.csv', 'a.csv', 'growing.csv']);
});

it('names what is not there', async () => {
	const { lookAtFolder, watchedUnit } = await import('$lib/server/services/watching');
	await expect(watchedUnit('U 1')).rejects.toMatchObject({ kind: 'not-found' });
	await expect(watchedUnit('00000000-0000-4000-8000-000000000000')).rejects.toMatchObject({ kind: 'not-found' });
	const { actor } = await watchedUnit(office.unitId);
	const gone = { actor, unitId: office.unitId, folder: join(folder, 'gone'), restSeconds: 1 };
	await expect(lookAtFolder(gone, {}, () => undefined)).rejects.toThrow(/ENOENT/);
});
