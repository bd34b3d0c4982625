import { createRequire } from 'node:module';
import { readFileSync } from 'node:fs';
import PDFDocument from 'pdfkit';

/** A drawing sheet as PDF: frame, flowing text, pictures from path data, and the title block in the lower corner. */

/** The day paper's inks (src/lib/styles/tokens.css). */
export const INKS = {
	ink: '#152220',
	ink2: '#46544f',
	edge: '#6f7c74',
	grid: '#cfd9cd',
	trip: '#b92f08',
	field: '#fbfcf9',
	load: '#1d2926',
	low: '#1a54b4',
	water: '#006a5c',
	high: '#8f2263',
	oil: '#8a5000',
	electrical: '#5f43a8'
} as const;
export type Ink = keyof typeof INKS;

/** A family's dash, so that colour is never the only difference (src/lib/components/charts/trace-style.ts). */
export const DASHES: Readonly<Partial<Record<Ink, number[]>>> = {
	low: [9, 2],
	water: [4, 2],
	high: [7, 2, 1.5, 2],
	oil: [7, 1.5, 1.5, 1.5, 1.5, 1.5],
	electrical: [2, 1.5]
};

const MARGIN = 30;
const PAD = 16;
const BLOCK_HEIGHT = 78;
const require = createRequire(import.meta.url);
let figures: Buffer | undefined;

/** JetBrains Mono as the pages use it; words are set in the reader's own sans, which every PDF reader has. */
function figuresFont(): Buffer {
	figures ??= readFileSync(require.resolve('@fontsource/jetbrains-mono/files/jetbrains-mono-latin-500-normal.woff'));
	return figures;
}

const SUBSTITUTES: readonly (readonly [RegExp, string])[] = [
	[/≤\s?/g, 'at most '],
	[/≥\s?/g, 'at least '],
	[/Ω/g, 'ohm'],
	[/[\u202f\u2009]/g, '\u00a0'],
	[/→/g, 'to']
];

/** Words with only the characters that the fonts have. */
export function printable(text: string, mono = false): string {
	let words = text;
	for (const [pattern, plain] of SUBSTITUTES) words = words.replaceAll(pattern, plain);
	return mono ? words : words.replaceAll('−', '–');
}

export type TextOptions = {
	size?: number;
	bold?: boolean;
	mono?: boolean;
	ink?: Ink;
	align?: 'left' | 'right' | 'center';
	/** points between lines */
	gap?: number;
};

export type Cell = { label: string; value: string };

export class Paper {
	readonly doc: PDFKit.PDFDocument;
	readonly left: number;
	readonly right: number;
	/** where the next thing goes */
	y: number;
	#pages = 1;
	readonly #done: Promise<Uint8Array>;

	constructor(size: 'A4' | 'LETTER', title: string) {
		this.doc = new PDFDocument({
			size,
			margin: 0,
			bufferPages: true,
			info: { Title: title, Creator: 'Firstpull' },
			lang: 'en'
		});
		this.doc.registerFont('mono', figuresFont());
		const chunks: Buffer[] = [];
		this.#done = new Promise((done, fail) => {
			this.doc.on('data', (chunk: Buffer) => chunks.push(chunk));
			this.doc.on('end', () => done(new Uint8Array(Buffer.concat(chunks))));
			this.doc.on('error', fail);
		});
		this.left = MARGIN + PAD;
		this.right = this.doc.page.width - MARGIN - PAD;
		this.y = MARGIN + PAD;
		this.#frame();
	}

	get width(): number {
		return this.right - this.left;
	}
	get pages(): number {
		return this.#pages;
	}
	get #bottom(): number {
		return this.doc.page.height - MARGIN - PAD;
	}

	#frame(): void {
		const { width, height } = this.doc.page;
		this.doc
			.lineWidth(0.8)
			.strokeColor(INKS.ink)
			.rect(MARGIN, MARGIN, width - 2 * MARGIN, height - 2 * MARGIN)
			.stroke();
	}

	/** Begins a new page when `height` does not fit; `last` keeps room for the title block as well. */
	room(height: number, last = false): void {
		if (this.y + height <= this.#bottom - (last ? BLOCK_HEIGHT : 0)) return;
		this.doc.addPage();
		this.#pages++;
		this.#frame();
		this.y = MARGIN + PAD;
	}

	#font({ size = 9.5, bold = false, mono = false, ink = 'ink' }: TextOptions): void {
		this.doc
			.font(mono ? 'mono' : bold ? 'Helvetica-Bold' : 'Helvetica')
			.fontSize(size)
			.fillColor(INKS[ink]);
	}

	/** How high some words are in a column. */
	height(text: string, width: number, options: TextOptions = {}): number {
		this.#font(options);
		return this.doc.heightOfString(printable(text, options.mono), { width, lineGap: options.gap ?? 1.5 });
	}

	/** Words at a place; gives their height. The cursor does not move. */
	place(text: string, x: number, y: number, width: number, options: TextOptions = {}): number {
		const height = this.height(text, width, options);
		this.doc.text(printable(text, options.mono), x, y, {
			width,
			align: options.align ?? 'left',
			lineGap: options.gap ?? 1.5
		});
		return height;
	}

	/** A run of words of which the first are bold; gives their height. */
	labelled(label: string, text: string, x: number, y: number, width: number, size = 9.5): number {
		const whole = this.height(`${label} ${text}`, width, { size, bold: true });
		this.#font({ size, bold: true });
		this.doc.text(`${printable(label)} `, x, y, { width, continued: true, lineGap: 1.5 });
		this.#font({ size });
		this.doc.text(printable(text), { lineGap: 1.5 });
		return Math.max(this.doc.y - y, whole - 14);
	}

	/** A paragraph over the whole width; the cursor moves on. */
	paragraph(text: string, options: TextOptions = {}, after = 6): void {
		const height = this.height(text, this.width, options);
		this.room(height);
		this.place(text, this.left, this.y, this.width, options);
		this.y += height + after;
	}

	rule(weight = 0.6, ink: Ink = 'ink', after = 8): void {
		this.doc.lineWidth(weight).strokeColor(INKS[ink]).moveTo(this.left, this.y).lineTo(this.right, this.y).stroke();
		this.y += after;
	}

	/** Path data, stroked or filled, moved to a place. */
	path(
		data: string,
		x: number,
		y: number,
		how: { stroke?: Ink; fill?: Ink; width?: number; dash?: number[]; opacity?: number }
	): void {
		if (data === '') return;
		const { doc } = this;
		doc.save().translate(x, y);
		if (how.opacity !== undefined) doc.opacity(how.opacity);
		if (how.dash) doc.dash(how.dash[0] ?? 2, { space: how.dash[1] ?? 2 });
		doc.path(data);
		if (how.fill) doc.fill(INKS[how.fill]);
		else
			doc
				.lineWidth(how.width ?? 0.7)
				.lineJoin('round')
				.stroke(INKS[how.stroke ?? 'ink']);
		doc.restore();
	}

	/** The title block on the frame's lower corner of the last page, then the whole file. */
	async finish(cells: readonly Cell[]): Promise<Uint8Array> {
		this.room(10, true);
		const width = Math.min(300, this.width);
		const [x, rows] = [this.doc.page.width - MARGIN - width, Math.ceil(cells.length / 2)];
		const rowHeight = BLOCK_HEIGHT / Math.max(3, rows);
		const top = this.doc.page.height - MARGIN - rowHeight * rows;
		cells.forEach(({ label, value }, i) => {
			const last = i === cells.length - 1 && cells.length % 2 === 1;
			const cellX = x + (i % 2) * (width / 2);
			const cellY = top + Math.floor(i / 2) * rowHeight;
			this.doc
				.lineWidth(0.8)
				.strokeColor(INKS.ink)
				.rect(cellX, cellY, last ? width : width / 2, rowHeight)
				.stroke();
			this.place(label, cellX + 6, cellY + 4, width / 2 - 10, { size: 6.5, ink: 'ink2' });
			this.place(value, cellX + 6, cellY + 12.5, (last ? width : width / 2) - 10, { size: 8, mono: true });
		});
		this.doc.end();
		return this.#done;
	}
}
