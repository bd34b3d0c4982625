import { StringDecoder } from 'node:string_decoder';
import { LogRefusal } from '../types';
import { ExactRows } from './exact';
import { MOST_LINE } from './look';
import { PapaRows } from './papa';
import type { Dictionary, RowHandler, RowPlan } from './row-plan';
import { RowScanner } from './scanner';

/** PapaParse is fastest on pieces of this size. */
const PIECE = 65_536;

/** Which reader cuts the rows: the scanner until quotes stop it, or PapaParse from the start. */
export type ReaderChoice = 'auto' | 'exact';

/**
 * Reads a text's rows from line `dataLine` on. Yields after every piece, so that the caller can pass on what has
 * gathered before more comes.
 * @throws LogRefusal when a record has no end
 */
export async function* readRows(
	text: AsyncIterable<Buffer>,
	plan: RowPlan,
	dataLine: number,
	handler: RowHandler,
	dictionaries: Dictionary[],
	reader: ReaderChoice = 'auto'
): AsyncIterable<void> {
	let skip = dataLine - 1;
	const scanner = new RowScanner(plan, handler, dictionaries, dataLine);
	let exact: Exact | null = reader === 'exact' ? new Exact(plan, handler, dictionaries, dataLine) : null;
	for await (const whole of text) {
		let chunk = whole;
		while (skip > 0) {
			const at = chunk.indexOf(10);
			if (at < 0) break;
			chunk = chunk.subarray(at + 1);
			skip--;
		}
		if (skip > 0) continue;
		if (!exact && !scanner.feed(chunk, false)) {
			exact = new Exact(plan, handler, dictionaries, scanner.line);
			exact.feed(scanner.rest);
		} else exact?.feed(chunk);
		yield;
	}
	if (!exact && !scanner.feed(Buffer.alloc(0), true)) {
		exact = new Exact(plan, handler, dictionaries, scanner.line);
		exact.feed(scanner.rest);
	}
	exact?.end();
	yield;
}

class Exact {
	readonly #rows: ExactRows;
	readonly #papa: PapaRows;
	readonly #decoder = new StringDecoder('utf8');
	readonly #line: number;

	constructor(plan: RowPlan, handler: RowHandler, dictionaries: Dictionary[], line: number) {
		this.#rows = new ExactRows(plan, handler, dictionaries);
		this.#papa = new PapaRows(plan.delimiter, line);
		this.#line = line;
	}

	feed(chunk: Buffer): void {
		for (let at = 0; at < chunk.length; at += PIECE) {
			const piece = this.#decoder.write(chunk.subarray(at, at + PIECE));
			for (const row of this.#papa.push(piece)) this.#rows.take(row);
			if (this.#papa.waiting > MOST_LINE) {
				throw new LogRefusal(
					'line-too-long',
					`After line ${this.#line} a quoted cell has no end within a megabyte; a quote is missing.`,
					'',
					this.#line
				);
			}
		}
	}

	end(): void {
		for (const row of this.#papa.push(this.#decoder.end(), true)) this.#rows.take(row);
	}
}
