import { LogRefusal, type Problem, type SourceFile } from '../types';
import { ByteStore } from './byte-store';
import { haystackRows } from './haystack';
import { inflate } from './inflate';
import { sheetRows } from './sheet';
import { sniff } from './sniff';
import { zipEntries, zipStream, type ZipEntry } from './zip';

/** One table of an upload, whatever it was packed in: `open` gives text bytes (a spreadsheet's as tab-separated UTF-8). */
export type Leaf = {
	/** Name as shown, with the archive's path. */
	file: string;
	source: number;
	entry: string[];
	container: 'text' | 'sheet' | 'haystack-json';
	/** Bytes of the text, when known before reading. */
	size: number | null;
	open(): AsyncIterable<Uint8Array>;
};

export type Unpacked = { leaves: Leaf[]; problems: Problem[]; close(): Promise<void> };

type Place = { file: string; source: number; entry: string[]; depth: number };
type Opener = () => AsyncIterable<Uint8Array>;

/** Bytes that decide what a file is. */
async function firstBytes(open: Opener): Promise<Uint8Array> {
	const parts: Uint8Array[] = [];
	let size = 0;
	for await (const chunk of open()) {
		parts.push(chunk);
		size += chunk.length;
		if (size >= 1024) break;
	}
	return Buffer.concat(parts);
}

class Unpacker {
	readonly leaves: Leaf[] = [];
	readonly problems: Problem[] = [];
	readonly stores: ByteStore[] = [];

	async add(place: Place, open: Opener, size: number | null): Promise<void> {
		const what = sniff(await firstBytes(open), place.file);
		if ('refuse' in what) throw new LogRefusal(what.kind, what.message, place.file);
		if (what.container === 'gzip') {
			const inner = { ...place, file: place.file.replace(/\.gz$/i, '') };
			await this.add(inner, () => inflate(open(), 'gzip', place.file), null);
		} else if (what.container === 'zip') await this.#zip(place, open);
		else if (what.container === 'haystack-json') {
			const rows = await haystackRows(open(), place.file);
			this.#leaf(place, 'haystack-json', rows.length, () => pieces(rows));
		} else this.#leaf(place, 'text', size, open);
	}

	#leaf(place: Place, container: Leaf['container'], size: number | null, open: Opener): void {
		this.leaves.push({ file: place.file, source: place.source, entry: place.entry, container, size, open });
	}

	async #zip(place: Place, open: Opener): Promise<void> {
		const store = await ByteStore.of(open());
		this.stores.push(store);
		const entries = await zipEntries(store, place.file);
		if (entries.some((e) => e.name === 'xl/workbook.xml')) return this.#sheets(place, store, entries);
		if (place.depth >= 2) {
			throw new LogRefusal(
				'archive-nested',
				`${place.file} is an archive in an archive in an archive; unpack one level.`,
				place.file
			);
		}
		if (entries.length === 0) {
			throw new LogRefusal('empty-archive', `${place.file} is an archive with nothing in it.`, place.file);
		}
		const before = this.leaves.length;
		for (const entry of entries) await this.#entry(place, store, entry);
		if (this.leaves.length === before) {
			throw new LogRefusal('archive-no-log', `${place.file} holds no file that can be a log.`, place.file);
		}
	}

	/** One file of an archive; one that is no text costs itself only, unless the archive itself is at fault. */
	async #entry(place: Place, store: ByteStore, entry: ZipEntry): Promise<void> {
		const inner = {
			file: `${place.file}/${entry.name}`,
			source: place.source,
			entry: [...place.entry, entry.name],
			depth: place.depth + 1
		};
		try {
			await this.add(inner, () => zipStream(store, entry, inner.file), entry.size);
		} catch (error) {
			if (!(error instanceof LogRefusal) || error.kind.startsWith('archive-')) throw error;
			this.problems.push({ file: inner.file, line: null, column: null, kind: 'file-skipped', message: error.message });
		}
	}

	async #sheets(place: Place, store: ByteStore, entries: ZipEntry[]): Promise<void> {
		const sheets = await sheetRows(store, entries, place.file);
		for (const { name, text } of sheets) {
			const file = sheets.length > 1 ? `${place.file}/${name}` : place.file;
			this.#leaf({ ...place, file, entry: [...place.entry, name] }, 'sheet', text.length, () => pieces(text));
		}
	}
}

async function* pieces(text: Uint8Array): AsyncIterable<Uint8Array> {
	for (let at = 0; at < text.length; at += 65_536) yield text.subarray(at, at + 65_536);
}

/**
 * Every table of an upload's files: gzip and zip opened (zip nested once), sheets and Haystack grids as text.
 * @throws LogRefusal for what cannot be opened; a file of an archive that is no text is only a problem
 */
export async function unpack(files: readonly SourceFile[]): Promise<Unpacked> {
	const unpacker = new Unpacker();
	const close = async () => {
		for (const store of unpacker.stores) await store.close();
	};
	try {
		for (const [source, file] of files.entries()) {
			await unpacker.add({ file: file.name, source, entry: [], depth: 0 }, () => file.open(), file.size);
		}
	} catch (error) {
		await close();
		throw error;
	}
	return { leaves: unpacker.leaves, problems: unpacker.problems, close };
}
