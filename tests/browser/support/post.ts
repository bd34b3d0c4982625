import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect } from '@playwright/test';
import { dataFolder } from './product';

/** The text of a message's parts, transfer encodings undone, soft line breaks joined. */
function plain(raw: string): string {
	const bytes = raw
		.replaceAll(/=\r\n/g, '')
		.replaceAll(/=([0-9A-F]{2})/g, (_all, hex: string) => String.fromCharCode(Number.parseInt(hex, 16)));
	return Buffer.from(bytes, 'latin1').toString('utf8');
}

function newest(to: string): string {
	const folder = join(dataFolder(), 'mail');
	const raw = readdirSync(folder)
		.sort()
		.map((name) => readFileSync(join(folder, name), 'latin1'))
		.filter((text) => new RegExp(`^To: .*${to}`, 'im').test(text));
	return plain(raw.at(-1) ?? '');
}

/** Waits for a message to an address that has what is looked for, and gives it. */
export async function letterTo(to: string, wanted: RegExp): Promise<string> {
	await expect.poll(() => wanted.test(newest(to)), { timeout: 30_000, message: `a letter to ${to}` }).toBe(true);
	return newest(to);
}
