import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

const NAME = 'running.json';

/** Leaves a note of where the running system is, for commands in a second shell. Only this account reads it. */
export function writeState(data, state) {
	writeFileSync(join(data, NAME), JSON.stringify(state, null, '\t'), { mode: 0o600 });
}

/** The note of {@link writeState}, or null when nothing was started from this data folder. */
export function readState(data) {
	const file = join(data, NAME);
	return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null;
}
