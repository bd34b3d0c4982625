import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { isRoot, root } from './paths.mjs';
import { capture, run, say } from './run.mjs';

const stamp = join(root, 'node_modules', '.firstpull-lock');

/** Installs the packages of package-lock.json unless that very lock is installed already. */
export async function installPackages() {
	const lock = createHash('sha256')
		.update(readFileSync(join(root, 'package-lock.json')))
		.digest('hex');
	if (existsSync(stamp) && readFileSync(stamp, 'utf8') === lock) return;
	say('Installing packages …');
	await run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], { cwd: root });
	writeFileSync(stamp, lock);
}

/**
 * Installs a Debian package, with `sudo` when the account is not root.
 * @throws Error that says what to install by hand when neither is possible
 */
export async function installDebian(packages, why) {
	const names = packages.join(' ');
	const sudo = !isRoot && (await capture('sudo', ['-n', 'true']).catch(() => ({ code: 1 }))).code === 0;
	if (!isRoot && !sudo) {
		throw new Error(
			`${why} is missing and this account may not install it. Please run, as root:\n  apt-get update && apt-get install -y --no-install-recommends ${names}`
		);
	}
	say(`Installing ${names} from Debian's packages …`);
	const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
	const apt = (args) =>
		run(isRoot ? 'apt-get' : 'sudo', isRoot ? args : ['-E', 'apt-get', ...args], {
			env,
			stdio: ['ignore', 'ignore', 'inherit']
		});
	await apt(['update', '-qq']);
	await apt(['install', '-y', '-qq', '--no-install-recommends', ...packages]);
}

/** Has Debian's PostgreSQL package been told not to make and start a cluster of its own? */
export async function refuseMainCluster() {
	const text = 'create_main_cluster = false\n';
	const script = `mkdir -p /etc/postgresql-common/createcluster.d && printf '%s' '${text}' > /etc/postgresql-common/createcluster.d/no-main-cluster.conf`;
	await run(isRoot ? 'sh' : 'sudo', isRoot ? ['-c', script] : ['-n', 'sh', '-c', script]);
}
