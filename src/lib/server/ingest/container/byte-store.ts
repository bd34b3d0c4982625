import { randomBytes } from 'node:crypto';
import { open, unlink, type FileHandle } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** Above this an archive waits in a temporary file, so that memory stays flat. */
const MOST_IN_MEMORY = 8 * 1024 * 1024;

/** Bytes that must be read out of order (an archive keeps its list at its end). Close it. */
export class ByteStore {
	size = 0;
	#chunks: Uint8Array[] = [];
	#joined: Uint8Array | null = null;
	#file: FileHandle | null = null;

	/** Takes a whole stream in. */
	static async of(stream: AsyncIterable<Uint8Array>): Promise<ByteStore> {
		const store = new ByteStore();
		try {
			for await (const chunk of stream) await store.#add(chunk);
		} catch (error) {
			await store.close();
			throw error;
		}
		return store;
	}

	async #add(chunk: Uint8Array): Promise<void> {
		if (this.#file) await this.#file.write(chunk, 0, chunk.length, this.size);
		else {
			this.#chunks.push(chunk);
			if (this.size + chunk.length > MOST_IN_MEMORY) await this.#spill();
		}
		this.size += chunk.length;
	}

	async #spill(): Promise<void> {
		const path = join(tmpdir(), `log-${randomBytes(12).toString('hex')}`);
		this.#file = await open(path, 'wx+', 0o600);
		// Unlinked at once: it vanishes with the handle, whatever happens to this process.
		await unlink(path);
		let at = 0;
		for (const chunk of this.#chunks) {
			await this.#file.write(chunk, 0, chunk.length, at);
			at += chunk.length;
		}
		this.#chunks = [];
	}

	/** Bytes `from` to `from + length`, fewer at the end. */
	async read(from: number, length: number): Promise<Uint8Array> {
		const n = Math.max(0, Math.min(length, this.size - from));
		if (this.#file) {
			const out = Buffer.allocUnsafe(n);
			const { bytesRead } = await this.#file.read(out, 0, n, from);
			return out.subarray(0, bytesRead);
		}
		this.#joined ??= Buffer.concat(this.#chunks);
		return this.#joined.subarray(from, from + n);
	}

	/** Bytes `from` to `to` in pieces of 64 KB. */
	async *stream(from: number, to: number): AsyncIterable<Uint8Array> {
		for (let at = from; at < to;) {
			const piece = await this.read(at, Math.min(65_536, to - at));
			if (piece.length === 0) return;
			// A reader downstream may keep the piece while the next is read.
			yield this.#file ? piece : piece.slice();
			at += piece.length;
		}
	}

	async close(): Promise<void> {
		await this.#file?.close();
		this.#file = null;
		this.#chunks = [];
		this.#joined = null;
		this.size = 0;
	}
}
