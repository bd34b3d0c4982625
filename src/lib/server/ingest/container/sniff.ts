/** What the first bytes of a file say it is. */
export type Container = 'text' | 'gzip' | 'zip' | 'haystack-json';

export type Sniffed = { container: Container } | { refuse: 413 | 415; kind: string; message: string };

const MAGIC: readonly [bytes: readonly number[], what: string, advice: string][] = [
	[
		[0xd0, 0xcf, 0x11, 0xe0],
		'an old-format or password-protected spreadsheet',
		'save it as .xlsx without a password, or as CSV'
	],
	[[0x25, 0x50, 0x44, 0x46], 'a PDF document', 'export the trend as CSV or spreadsheet instead of printing it'],
	[[0x37, 0x7a, 0xbc, 0xaf], 'a 7z archive', 'pack the files as .zip'],
	[[0x52, 0x61, 0x72, 0x21], 'a RAR archive', 'pack the files as .zip'],
	[[0x42, 0x5a, 0x68], 'a bzip2 file', 'pack it as .gz or .zip'],
	[[0xfd, 0x37, 0x7a, 0x58], 'an xz file', 'pack it as .gz or .zip'],
	[[0x28, 0xb5, 0x2f, 0xfd], 'a zstd file', 'pack it as .gz or .zip'],
	[[0x89, 0x50, 0x4e, 0x47], 'a picture', 'a picture of a trend cannot be read; export the figures'],
	[[0xff, 0xd8, 0xff], 'a picture', 'a picture of a trend cannot be read; export the figures'],
	[[0x47, 0x49, 0x46, 0x38], 'a picture', 'a picture of a trend cannot be read; export the figures'],
	[[0x7f, 0x45, 0x4c, 0x46], 'a program', 'send the exported log itself'],
	[[0x4d, 0x5a, 0x90, 0x00], 'a program', 'send the exported log itself'],
	[[0x53, 0x51, 0x4c, 0x69, 0x74, 0x65], 'a database file', 'export the trend as CSV'],
	[[0x50, 0x41, 0x52, 0x31], 'a Parquet file', 'export the trend as CSV']
];

function startsWith(bytes: Uint8Array, magic: readonly number[]): boolean {
	return bytes.length >= magic.length && magic.every((b, i) => bytes[i] === b);
}

function refuse(kind: string, message: string): Sniffed {
	return { refuse: 415, kind, message };
}

/**
 * What a file is, from its first bytes (512 or more are best) and its name; or why it is refused at once.
 * Text in any encoding passes here: whether it is a log, only reading shows.
 */
export function sniff(bytes: Uint8Array, name: string): Sniffed {
	if (bytes.length === 0) return refuse('empty', `${name} is empty: no bytes arrived.`);
	if (startsWith(bytes, [0x1f, 0x8b])) return { container: 'gzip' };
	if (startsWith(bytes, [0x50, 0x4b, 0x03, 0x04])) return { container: 'zip' };
	if (startsWith(bytes, [0x50, 0x4b, 0x05, 0x06]))
		return refuse('empty-archive', `${name} is an archive with nothing in it.`);
	for (const [magic, what, advice] of MAGIC) {
		if (startsWith(bytes, magic)) return refuse('container', `${name} is ${what}; ${advice}.`);
	}
	if (bytes.length > 262 && String.fromCharCode(...bytes.subarray(257, 262)) === 'ustar') {
		return refuse('container', `${name} is a tar archive; pack the files as .zip.`);
	}
	if (looksBinary(bytes)) return refuse('binary', `${name} is neither text nor an archive that can be read.`);
	const start = textStart(bytes);
	if (/^(<!doctype html|<html|<head|<body)/i.test(start)) {
		return refuse('web-page', `${name} is a web page, perhaps a sign-in page saved instead of the export.`);
	}
	if (/^(<\?xml|<[a-z])/i.test(start)) return refuse('xml', `${name} is XML; export the trend as CSV or spreadsheet.`);
	if (/^[[{]\s*("|\{|\[)/.test(start)) return { container: 'haystack-json' };
	return { container: 'text' };
}

function textStart(bytes: Uint8Array): string {
	let text = '';
	for (const b of bytes.subarray(0, 200)) if (b !== 0 && b < 0x80) text += String.fromCharCode(b);
	return text.trimStart();
}

/** Byte-order marks of UTF-16, or a zero in nearly every second byte, as Latin text has in it. */
export function utf16Kind(bytes: Uint8Array): 'utf-16le' | 'utf-16be' | null {
	if (startsWith(bytes, [0xff, 0xfe])) return 'utf-16le';
	if (startsWith(bytes, [0xfe, 0xff])) return 'utf-16be';
	const n = Math.min(bytes.length, 512) & ~1;
	if (n < 8) return null;
	let even = 0;
	let odd = 0;
	for (let i = 0; i < n; i += 2) {
		if (bytes[i] === 0) even++;
		if (bytes[i + 1] === 0) odd++;
	}
	if (odd > 0.4 * n && even < 0.02 * n) return 'utf-16le';
	if (even > 0.4 * n && odd < 0.02 * n) return 'utf-16be';
	return null;
}

function looksBinary(bytes: Uint8Array): boolean {
	if (utf16Kind(bytes)) return false;
	let odd = 0;
	for (const b of bytes) {
		if (b === 0) return true;
		if (b < 32 && b !== 9 && b !== 10 && b !== 13 && b !== 12 && b !== 26 && b !== 30) odd++;
	}
	return odd > bytes.length / 50;
}
