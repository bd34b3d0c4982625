import type { Leaf } from '../container/unpack';
import { LogRefusal } from '../types';
import { textForm, toUtf8, type TextForm } from './encoding';

/** A record longer than this is no row of a log. */
export const MOST_LINE = 1024 * 1024;
const HEAD = 128 * 1024;
/** Runs of neighbouring lines kept from the rest of the file, so that the whole range is seen. */
const MOST_RUNS = 260;
const RUN = 3;

/** What one pass over a text saw: its head whole, and runs of lines spread over the rest. */
export type Look = {
	form: TextForm;
	/** The first lines, complete ones only (the last line of a short file included). */
	head: string;
	/** Runs of up to three neighbouring lines, in order; none from the head. */
	runs: { line: number; lines: string[] }[];
	lines: number;
	bytes: number;
	/** Does the text end without a line end? */
	openEnd: boolean;
};

class Looker {
	readonly head: Buffer[] = [];
	headSize = 0;
	runs: { line: number; lines: string[] }[] = [];
	lines = 0;
	bytes = 0;
	sinceLine = 0;
	#stride = 8192;
	#nextRun = HEAD;
	#last: Buffer = Buffer.alloc(0);

	take(chunk: Buffer, file: string): void {
		if (this.headSize < HEAD) {
			this.head.push(chunk);
			this.headSize += chunk.length;
		}
		let line = 0;
		let at = chunk.indexOf(10);
		if (at < 0) this.sinceLine += chunk.length;
		while (at >= 0) {
			this.lines++;
			this.sinceLine = 0;
			line = at + 1;
			if (this.bytes + line >= this.#nextRun && this.headSize >= HEAD) at = this.#run(chunk, line);
			else at = chunk.indexOf(10, line);
			if (at >= 0) continue;
			this.sinceLine = chunk.length - line;
		}
		if (this.sinceLine > MOST_LINE) {
			const n = this.lines + 1;
			throw new LogRefusal(
				'line-too-long',
				`Line ${n} of ${file} has no end within a megabyte; this is no table of readings.`,
				file,
				n
			);
		}
		this.bytes += chunk.length;
		this.#last = chunk;
	}

	/** Keeps the lines from `from` on; returns the place of the line end after them, as the counting loop wants it. */
	#run(chunk: Buffer, from: number): number {
		const lines: string[] = [];
		const first = this.lines + 1;
		let start = from;
		let end = chunk.indexOf(10, start);
		while (end >= 0 && lines.length < RUN) {
			lines.push(chunk.toString('utf8', start, end).replace(/\r$/, ''));
			this.lines++;
			start = end + 1;
			end = chunk.indexOf(10, start);
		}
		if (lines.length > 0) this.runs.push({ line: first, lines });
		if (this.runs.length > MOST_RUNS) {
			this.runs = this.runs.filter((_, i) => i % 2 === 0);
			this.#stride *= 2;
		}
		this.#nextRun = this.bytes + start + this.#stride;
		this.sinceLine = chunk.length - start;
		return end;
	}

	get openEnd(): boolean {
		return this.#last.length > 0 && this.#last[this.#last.length - 1] !== 10;
	}

	/** The last lines of the text, as a run of their own. */
	tail(): void {
		if (this.bytes <= this.headSize) return;
		const lines = this.#last.toString('utf8').split(/\r?\n/).slice(1);
		if (!this.openEnd) lines.pop();
		const kept = lines.slice(-RUN);
		if (kept.length > 0) this.runs.push({ line: this.lines + (this.openEnd ? 1 : 0) - kept.length + 1, lines: kept });
	}
}

/**
 * Passes once over a text.
 * @throws LogRefusal when a line has no end
 */
export async function look(leaf: Leaf): Promise<Look> {
	const looker = new Looker();
	const first: Uint8Array[] = [];
	let firstSize = 0;
	let form: TextForm | null = null;
	// The form is judged on the first 64 KB; a text that is shorter is judged whole.
	const source = leaf.open()[Symbol.asyncIterator]();
	let ended = false;
	while (!ended && firstSize < 65_536) {
		const next = await source.next();
		if (next.done) ended = true;
		else {
			first.push(next.value);
			firstSize += next.value.length;
		}
	}
	form = textForm(Buffer.concat(first));
	async function* again(): AsyncIterable<Uint8Array> {
		yield* first;
		while (!ended) {
			const next = await source.next();
			if (next.done) return;
			yield next.value;
		}
	}
	for await (const chunk of toUtf8(again(), form)) looker.take(chunk, leaf.file);
	looker.tail();
	let head = Buffer.concat(looker.head).toString('utf8');
	if (looker.bytes > looker.headSize || !looker.openEnd) head = head.slice(0, head.lastIndexOf('\n') + 1);
	return {
		form,
		head: head.replace(/\r\n/g, '\n'),
		runs: looker.runs,
		lines: looker.lines + (looker.openEnd ? 1 : 0),
		bytes: looker.bytes,
		openEnd: looker.openEnd
	};
}
