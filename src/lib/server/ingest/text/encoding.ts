import { alignedCuts, alignText } from './aligned';
import { DOS_DEGREE, legacyEncoding } from './legacy';
import { utf16Kind } from '../container/sniff';

/** How a text's bytes are to be understood. */
export type TextForm = {
	encoding: string;
	mark: number;
	crOnly: boolean;
	/** Where cells begin in a table aligned by spaces; null for one with delimiters. */
	cuts: number[] | null;
};

/** So much of a text tells whether it is aligned by spaces. */
const MOST_JUDGED = 65_536;

/** Is this UTF-8? A character cut off at the end does not count against it. */
function isUtf8(bytes: Uint8Array): boolean {
	try {
		new TextDecoder('utf-8', { fatal: true }).decode(bytes, { stream: true });
		return true;
	} catch {
		return false;
	}
}

/**
 * Encoding, length of the byte-order mark and line ends of a text from its first bytes. What is neither UTF-16 nor
 * UTF-8 is of an older logger, see {@link legacyEncoding}.
 */
export function textForm(bytes: Uint8Array): TextForm {
	const form = plainForm(bytes);
	const text = new TextDecoder(labelOf(form.encoding)).decode(bytes.subarray(0, MOST_JUDGED));
	// The piece at hand may end in the middle of a line.
	const whole = bytes.length > MOST_JUDGED ? text.lastIndexOf('\n') : -1;
	return { ...form, cuts: alignedCuts(whole < 0 ? text : text.slice(0, whole)) };
}

function plainForm(bytes: Uint8Array): Omit<TextForm, 'cuts'> {
	const wide = utf16Kind(bytes);
	if (wide) {
		const mark = (bytes[0] ?? 0) >= 0xfe ? 2 : 0;
		const unit = wide === 'utf-16le' ? 0 : 1;
		const plain = bytes.filter((_, i) => i % 2 === unit);
		return { encoding: wide, mark, crOnly: !plain.includes(10) && plain.includes(13) };
	}
	const crOnly = !bytes.includes(10) && bytes.includes(13);
	if (bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) return { encoding: 'utf-8', mark: 3, crOnly };
	return { encoding: isUtf8(bytes) ? 'utf-8' : legacyEncoding(bytes), mark: 0, crOnly };
}

/** The text as UTF-8 bytes with line feeds, mark gone, cells apart. Plain UTF-8 passes through without a copy. */
export function toUtf8(source: AsyncIterable<Uint8Array>, form: TextForm): AsyncIterable<Buffer> {
	const text = decoded(source, form);
	return form.cuts ? alignText(text, form.cuts) : text;
}

async function* decoded(source: AsyncIterable<Uint8Array>, form: TextForm): AsyncIterable<Buffer> {
	let mark = form.mark;
	const decoder = form.encoding === 'utf-8' ? null : new TextDecoder(labelOf(form.encoding), { ignoreBOM: true });
	const dos = form.encoding === 'ibm850';
	for await (const raw of source) {
		let chunk: Buffer = Buffer.from(raw.buffer, raw.byteOffset, raw.byteLength);
		if (mark > 0) {
			const cut = Math.min(mark, chunk.length);
			mark -= cut;
			chunk = chunk.subarray(cut);
		}
		if (dos) chunk = withDegrees(chunk);
		if (decoder) chunk = Buffer.from(decoder.decode(chunk, { stream: true }), 'utf8');
		if (chunk.length === 0) continue;
		yield form.crOnly ? withLineFeeds(chunk) : chunk;
	}
	const rest = decoder?.decode();
	if (rest) yield Buffer.from(rest, 'utf8');
}

/** What the platform's decoder calls an encoding; it knows none of DOS, whose degree sign is put right beforehand. */
const labelOf = (encoding: string): string => (encoding === 'ibm850' ? 'windows-1252' : encoding);

function withDegrees(chunk: Buffer): Buffer {
	const out = Buffer.from(chunk);
	for (let i = out.indexOf(DOS_DEGREE); i >= 0; i = out.indexOf(DOS_DEGREE, i + 1)) out[i] = 0xb0;
	return out;
}

function withLineFeeds(chunk: Buffer): Buffer {
	const out = Buffer.from(chunk);
	for (let i = out.indexOf(13); i >= 0; i = out.indexOf(13, i + 1)) out[i] = 10;
	return out;
}
