import { Readable } from 'node:stream';
import { createGunzip, createInflateRaw } from 'node:zlib';
import { LogRefusal } from '../types';

/** A log compresses 5 to 60 times; dead columns more. Beyond this ratio, past a first 64 MB, it is a bomb. */
const MOST_RATIO = 300;
const RATIO_AFTER = 64 * 1024 * 1024;
/** One file, unpacked. */
const MOST_UNPACKED = 8 * 1024 ** 3;

/** Unpacks a stream, refusing bombs, damage and a cut-off end with the file's name. */
export async function* inflate(
	source: AsyncIterable<Uint8Array>,
	form: 'gzip' | 'raw',
	file: string
): AsyncIterable<Uint8Array> {
	let packed = 0;
	let unpacked = 0;
	async function* counted(): AsyncIterable<Uint8Array> {
		for await (const chunk of source) {
			packed += chunk.length;
			yield chunk;
		}
	}
	const engine = form === 'gzip' ? createGunzip({ chunkSize: 65_536 }) : createInflateRaw({ chunkSize: 65_536 });
	const input = Readable.from(counted(), { objectMode: false, highWaterMark: 65_536 });
	input.on('error', (error) => engine.destroy(error));
	input.pipe(engine);
	try {
		for await (const chunk of engine) {
			const bytes = chunk as Uint8Array;
			unpacked += bytes.length;
			if (unpacked > MOST_UNPACKED || (unpacked > RATIO_AFTER && unpacked > MOST_RATIO * packed)) {
				throw new LogRefusal(
					'archive-bomb',
					`${file} unpacks to far more than a log holds; it was not read further.`,
					file
				);
			}
			yield bytes;
		}
	} catch (error) {
		throw refusal(error, file);
	} finally {
		input.destroy();
		engine.destroy();
	}
}

function refusal(error: unknown, file: string): unknown {
	const code = error instanceof Error && 'code' in error ? String(error.code) : '';
	if (code === 'Z_BUF_ERROR')
		return new LogRefusal('archive-truncated', `${file} is cut off: the packed data end early.`, file);
	if (code.startsWith('Z_'))
		return new LogRefusal('archive-damaged', `${file} is damaged: the packed data cannot be read.`, file);
	return error;
}
