import { createHash } from 'node:crypto';
import { accessSync, constants, existsSync, mkdirSync, readFileSync, statSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The checkout this command runs in. */
export const root = resolve(dirname(fileURLToPath(import.meta.url)), '../../..');

export const isRoot = process.getuid?.() === 0;

/** The account PostgreSQL runs as: `postgres` for root (which may not run it), else the present one. */
export function databaseAccount() {
	if (!isRoot) return null;
	const line = readFileSync('/etc/passwd', 'utf8')
		.split('\n')
		.find((entry) => entry.startsWith('postgres:'));
	if (!line) throw new Error('The account "postgres" is missing although PostgreSQL is installed.');
	const [, , uid, gid] = line.split(':');
	return { uid: Number(uid), gid: Number(gid) };
}

/** Can another account walk down to `path`? Every parent needs its x bit for others. */
export function traversable(path) {
	for (let at = resolve(path); ; at = dirname(at)) {
		if (existsSync(at) && !(statSync(at).mode & 0o001)) return false;
		if (dirname(at) === at) return true;
	}
}

/** Folder for everything kept between runs: DATA_DIR, else `.data` in the checkout. */
export function dataFolder(name = '') {
	const base = resolve(process.env.DATA_DIR || join(root, '.data'));
	const folder = join(base, name);
	mkdirSync(folder, { recursive: true });
	accessSync(folder, constants.W_OK);
	return folder;
}

/** PostgreSQL's own folder: under the data folder when its account can get there, else under /var/tmp. */
export function databaseFolder(base) {
	if (!isRoot || traversable(base)) return join(base, 'postgres');
	const tag = createHash('sha256').update(base).digest('hex').slice(0, 12);
	return join('/var/tmp', `firstpull-${tag}`, 'postgres');
}
