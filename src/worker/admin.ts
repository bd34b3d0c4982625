/** `npm run admin`: what an administrator does from a shell. */
import { SCOPES, type Scope } from '$lib/model/people';
import { closeQueue } from '$lib/server/jobs/queue';
import { closeDatabase } from '$lib/server/repositories/transaction';
import { firstRunCode } from '$lib/server/services/first-run';
import { keyForMember } from '$lib/server/services/keys';
import { parseArgs } from 'node:util';
import { watch } from './watch';

const USAGE = `npm run admin -- key create --member <e-mail> [--name <name>] [--scope read|logs|write] [--days <n>]
    makes an API key that acts as this member, and prints it once
npm run admin -- watch <folder> --unit <id> [--every <seconds>] [--once]
    takes what comes into a folder in as logs of a unit, until Ctrl-C
npm run admin -- first-run-code
    prints a new code for the first visit, while there is no organisation`;

async function createKey(args: string[]): Promise<void> {
	const { values } = parseArgs({
		args,
		options: {
			member: { type: 'string' },
			name: { type: 'string', default: 'made in a shell' },
			scope: { type: 'string', multiple: true, default: ['write'] },
			days: { type: 'string' }
		}
	});
	const scopes = values.scope as Scope[];
	const wrong = scopes.find((scope) => !SCOPES.includes(scope));
	if (!values.member || wrong) throw new Error(wrong ? `“${wrong}” is no scope: ${SCOPES.join(', ')}` : USAGE);
	const days = values.days ? Number(values.days) : null;
	console.log(await keyForMember(values.member, values.name, scopes, days));
}

async function main([group, ...rest]: string[]): Promise<void> {
	if (group === 'key' && rest[0] === 'create') return createKey(rest.slice(1));
	if (group === 'watch') return watch(rest, USAGE);
	if (group === 'first-run-code') {
		console.log((await firstRunCode()) ?? 'There is an organisation already.');
		return;
	}
	throw new Error(USAGE);
}

main(process.argv.slice(2))
	.catch((error: unknown) => {
		console.error(error instanceof Error ? error.message : error);
		process.exitCode = 1;
	})
	.finally(async () => {
		await closeQueue();
		await closeDatabase();
	});
