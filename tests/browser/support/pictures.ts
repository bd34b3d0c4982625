import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import sharp from 'sharp';

/** Pictures of the main screens, kept small (lossless WebP) beside the Chromium that drew them, and compared. */

const folder = fileURLToPath(new URL('../pictures', import.meta.url));
const drawnBy = join(folder, 'drawn-by.txt');

/** A pixel counts as different from 1 part in 16 of a channel's range on; finer is the rounding of text edges. */
const DIFFERENT = 16;
/** At most this share of a picture's pixels, and of any of its bands (issue: 0.5 %). */
const MOST_OF_PICTURE = 0.005;
/**
 * A strip that stands a pixel off changes little of a whole page but much of itself: no band of this many rows may
 * differ by more than `MOST_OF_BAND`.
 */
const BAND_ROWS = 50;
const MOST_OF_BAND = 0.02;

type Raw = { data: Buffer; width: number; height: number };

async function raw(image: Buffer): Promise<Raw> {
	const { data, info } = await sharp(image).removeAlpha().raw().toBuffer({ resolveWithObject: true });
	return { data, width: info.width, height: info.height };
}

/** Why two pictures are not the same, or null. */
export async function difference(before: Buffer, after: Buffer): Promise<string | null> {
	const [a, b] = await Promise.all([raw(before), raw(after)]);
	if (a.width !== b.width || a.height !== b.height)
		return `${b.width} × ${b.height} px, recorded ${a.width} × ${a.height}`;
	const rows = new Uint32Array(a.height);
	for (let y = 0; y < a.height; y++) rows[y] = differentIn(a, b, y);
	const all = rows.reduce((sum, count) => sum + count, 0) / (a.width * a.height);
	if (all > MOST_OF_PICTURE) return `${(100 * all).toFixed(2)} % of the pixels differ`;
	for (let top = 0; top < a.height; top += BAND_ROWS) {
		const band = rows.subarray(top, top + BAND_ROWS);
		const share = band.reduce((sum, count) => sum + count, 0) / (band.length * a.width);
		if (share > MOST_OF_BAND)
			return `${(100 * share).toFixed(2)} % of the pixels differ between ${top} and ${top + band.length} px`;
	}
	return null;
}

function differentIn(a: Raw, b: Raw, y: number): number {
	let count = 0;
	for (let at = y * a.width * 3; at < (y + 1) * a.width * 3; at += 3) {
		const off = Math.max(
			Math.abs((a.data[at] ?? 0) - (b.data[at] ?? 0)),
			Math.abs((a.data[at + 1] ?? 0) - (b.data[at + 1] ?? 0)),
			Math.abs((a.data[at + 2] ?? 0) - (b.data[at + 2] ?? 0))
		);
		if (off >= DIFFERENT) count++;
	}
	return count;
}

/** Is this the Chromium that drew the recorded pictures? Another one draws text otherwise and proves nothing. */
export function drawnHere(version: string): boolean {
	return existsSync(drawnBy) && readFileSync(drawnBy, 'utf8').trim() === version;
}

/** The recorded picture of a screen, or null when none is kept. */
export function recorded(name: string): Buffer | null {
	const file = join(folder, `${name}.webp`);
	return existsSync(file) ? readFileSync(file) : null;
}

/** Keeps a picture as the one to compare with. */
export async function record(name: string, image: Buffer, version: string): Promise<void> {
	mkdirSync(folder, { recursive: true });
	writeFileSync(join(folder, `${name}.webp`), await sharp(image).webp({ lossless: true, effort: 6 }).toBuffer());
	writeFileSync(drawnBy, `${version}\n`);
}
