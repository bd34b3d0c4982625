import { LogRefusal } from '../types';
import type { ByteStore } from './byte-store';
import { inflate } from './inflate';

/** One file of an archive. */
export type ZipEntry = { name: string; method: number; packed: number; size: number; at: number };

const MOST_ENTRIES = 5000;
const END = 0x06054b50;
const END64_LOCATOR = 0x07064b50;
const CENTRAL = 0x02014b50;
const LOCAL = 0x04034b50;

function view(bytes: Uint8Array): DataView {
	return new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}

/** Names that would write outside a folder are no names of logs. Nothing is ever unpacked to disk under them anyway. */
function refusePath(name: string, file: string): void {
	const bad =
		name.startsWith('/') || name.startsWith('\\') || /^[a-z]:/i.test(name) || /(^|[\\/])\.\.([\\/]|$)/.test(name);
	if (bad || name.includes('\0')) {
		const shown = name.slice(0, 80).replace(/\0/g, '?');
		throw new LogRefusal(
			'archive-path',
			`${file} holds a file named "${shown}", which points outside the archive.`,
			file
		);
	}
}

async function findEnd(store: ByteStore, file: string): Promise<{ entries: number; size: number; at: number }> {
	const tail = await store.read(Math.max(0, store.size - 66_000), 66_000);
	const tailAt = Math.max(0, store.size - 66_000);
	const v = view(tail);
	for (let i = tail.length - 22; i >= 0; i--) {
		if (v.getUint32(i, true) !== END) continue;
		const found = {
			entries: v.getUint16(i + 10, true),
			size: v.getUint32(i + 12, true),
			at: v.getUint32(i + 16, true)
		};
		if (found.entries !== 0xffff && found.at !== 0xffffffff) return found;
		return end64(store, tailAt + i - 20, file);
	}
	throw new LogRefusal('archive-truncated', `${file} is cut off: the archive's list of files is missing.`, file);
}

async function end64(store: ByteStore, locatorAt: number, file: string) {
	const locator = view(await store.read(locatorAt, 20));
	if (locator.byteLength === 20 && locator.getUint32(0, true) === END64_LOCATOR) {
		const record = view(await store.read(Number(locator.getBigUint64(8, true)), 56));
		if (record.byteLength === 56) {
			return {
				entries: Number(record.getBigUint64(32, true)),
				size: Number(record.getBigUint64(40, true)),
				at: Number(record.getBigUint64(48, true))
			};
		}
	}
	throw new LogRefusal('archive-damaged', `${file} is damaged: its list of files cannot be found.`, file);
}

/** Sizes and place of an entry of over 4 GB stand in an extra field. */
function wide(extra: DataView, entry: ZipEntry): void {
	for (let i = 0; i + 4 <= extra.byteLength;) {
		const [id, size] = [extra.getUint16(i, true), extra.getUint16(i + 2, true)];
		let at = i + 4;
		if (id === 1) {
			for (const key of ['size', 'packed', 'at'] as const) {
				if (entry[key] !== 0xffffffff || at + 8 > extra.byteLength) continue;
				entry[key] = Number(extra.getBigUint64(at, true));
				at += 8;
			}
		}
		i += 4 + size;
	}
}

function entryAt(list: Uint8Array, i: number, file: string): { entry: ZipEntry; next: number } {
	const v = view(list);
	if (i + 46 > list.length || v.getUint32(i, true) !== CENTRAL) {
		throw new LogRefusal('archive-damaged', `${file} is damaged: its list of files breaks off.`, file);
	}
	const flags = v.getUint16(i + 8, true);
	const [n, extra, comment] = [v.getUint16(i + 28, true), v.getUint16(i + 30, true), v.getUint16(i + 32, true)];
	const name = new TextDecoder(flags & 0x800 ? 'utf-8' : 'windows-1252').decode(list.subarray(i + 46, i + 46 + n));
	if (flags & 1) {
		throw new LogRefusal('archive-password', `${file} is protected by a password; pack it again without one.`, file);
	}
	const entry: ZipEntry = {
		name,
		method: v.getUint16(i + 10, true),
		packed: v.getUint32(i + 20, true),
		size: v.getUint32(i + 24, true),
		at: v.getUint32(i + 42, true)
	};
	refusePath(name, file);
	const from = i + 46 + n;
	wide(view(list.subarray(from, Math.min(from + extra, list.length))), entry);
	return { entry, next: from + extra + comment };
}

/**
 * The files of an archive, folders and the litter of file managers left out.
 * @throws LogRefusal when the archive is cut off, damaged, has a password, too many files or a path that leads out
 */
export async function zipEntries(store: ByteStore, file: string): Promise<ZipEntry[]> {
	const end = await findEnd(store, file);
	if (end.entries > MOST_ENTRIES) {
		throw new LogRefusal('archive-bomb', `${file} holds ${end.entries} files; at most ${MOST_ENTRIES} are read.`, file);
	}
	if (end.at + end.size > store.size) {
		throw new LogRefusal('archive-truncated', `${file} is cut off: the archive is shorter than its list says.`, file);
	}
	const list = await store.read(end.at, end.size);
	const entries: ZipEntry[] = [];
	for (let i = 0, k = 0; k < end.entries; k++) {
		const { entry, next } = entryAt(list, i, file);
		i = next;
		if (!/[\\/]$/.test(entry.name) && !/(^|\/)(__MACOSX\/|\.DS_Store$|Thumbs\.db$|\._)/.test(entry.name))
			entries.push(entry);
	}
	return entries;
}

/** The bytes of one file of an archive. */
export async function* zipStream(store: ByteStore, entry: ZipEntry, file: string): AsyncIterable<Uint8Array> {
	const local = view(await store.read(entry.at, 30));
	if (local.byteLength < 30 || local.getUint32(0, true) !== LOCAL) {
		throw new LogRefusal(
			'archive-damaged',
			`${file} is damaged: the file "${entry.name}" is not where the list says.`,
			file
		);
	}
	const from = entry.at + 30 + local.getUint16(26, true) + local.getUint16(28, true);
	const packed = store.stream(from, from + entry.packed);
	if (entry.method === 0) yield* packed;
	else if (entry.method === 8) yield* inflate(packed, 'raw', file);
	else
		throw new LogRefusal(
			'archive-method',
			`"${entry.name}" is packed in a way that cannot be read; use plain zip.`,
			file
		);
}
