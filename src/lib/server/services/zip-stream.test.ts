import { strFromU8, strToU8, unzipSync } from 'fflate';
import { expect, it } from 'vitest';
import { zipStream, type ZipEntry } from './zip-stream';

// Invented files.
async function* words(...texts: string[]): AsyncGenerator<Uint8Array> {
	for (const text of texts) yield strToU8(text);
}
const bytesOf = async (stream: ReadableStream<Uint8Array>): Promise<Uint8Array> =>
	new Uint8Array(await new Response(stream).arrayBuffer());

it('gives every file back, packed or not, and says when it ended', async () => {
	const entries: ZipEntry[] = [
		{ path: 'a/one.txt', chunks: () => words('one ', 'and ', 'more'), packed: false },
		{ path: 'two.gz', chunks: () => words('two'), packed: true },
		{ path: 'empty.txt', chunks: () => words(), packed: false }
	];
	let ends = 0;
	const files = unzipSync(await bytesOf(zipStream(entries, async () => void ends++)));
	expect(Object.fromEntries(Object.entries(files).map(([name, bytes]) => [name, strFromU8(bytes)]))).toEqual({
		'a/one.txt': 'one and more',
		'two.gz': 'two',
		'empty.txt': ''
	});
	expect(ends).toBe(1);
});

it('breaks off, and cleans up, when a file cannot be read', async () => {
	let ends = 0;
	async function* broken(): AsyncGenerator<Uint8Array> {
		yield strToU8('begins');
		throw new Error('no such object');
	}
	const stream = zipStream([{ path: 'a', chunks: broken, packed: false }], async () => void ends++);
	await expect(bytesOf(stream)).rejects.toThrow('no such object');
	expect(ends).toBe(1);
});
