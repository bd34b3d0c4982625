import { Zip, ZipDeflate, ZipPassThrough } from 'fflate';

/** One file of a zip: its bytes come when they are wanted. `packed` files are not packed again. */
export type ZipEntry = { path: string; chunks: () => AsyncIterable<Uint8Array>; packed: boolean };

async function* zipped(entries: Iterable<ZipEntry>): AsyncGenerator<Uint8Array> {
	let ready: Uint8Array[] = [];
	let failure: Error | null = null;
	const zip = new Zip((error, chunk) => {
		if (error) failure = error;
		else ready.push(chunk);
	});
	function* drain(): Generator<Uint8Array> {
		if (failure) throw failure;
		const parts = ready;
		ready = [];
		yield* parts;
	}
	for (const { path, chunks, packed } of entries) {
		const file = packed ? new ZipPassThrough(path) : new ZipDeflate(path, { level: 3 });
		zip.add(file);
		for await (const chunk of chunks()) {
			file.push(chunk);
			yield* drain();
		}
		file.push(new Uint8Array(0), true);
		yield* drain();
	}
	zip.end();
	yield* drain();
}

/**
 * A zip as a stream: one chunk of one file is in memory at a time, however large the whole. `ended` runs when the last
 * byte is out, when the reader goes away, and when reading a file fails.
 */
export function zipStream(entries: Iterable<ZipEntry>, ended: () => Promise<void>): ReadableStream<Uint8Array> {
	const parts = zipped(entries);
	return new ReadableStream<Uint8Array>({
		async pull(controller) {
			try {
				const { done, value } = await parts.next();
				if (!done) return controller.enqueue(value);
				await ended();
				controller.close();
			} catch (error) {
				await ended();
				controller.error(error);
			}
		},
		async cancel() {
			await parts.return(undefined);
			await ended();
		}
	});
}
