import { deflateRawSync, inflateRawSync } from 'node:zlib';
import type { Scale } from './types';

/**
 * Times and values of blocks as bytes. Times: delta of delta, zig-zag varint, deflate. Values: the file's own few digits
 * as integers where they have such, their deltas zig-zag varint, deflate; else 32-bit floats with their bytes shuffled
 * where nothing is lost; else 64-bit. What is decoded equals what was encoded bit for bit, NaN included.
 */
const LEVEL = 1;
const [INTEGERS, FLOAT32, FLOAT64, CONSTANT] = [1, 2, 3, 4];
/** Decimal places tried for the file's figures. */
const MOST_PLACES = 6;
/** Deltas beyond this would leave the range in which a varint of two 32-bit halves is quick. */
const MOST_INTEGER = 2 ** 46;

class Bytes {
	#buffer: Buffer;
	length = 0;

	constructor(size: number) {
		this.#buffer = Buffer.allocUnsafe(Math.max(64, size));
	}

	#room(n: number): void {
		if (this.length + n <= this.#buffer.length) return;
		const larger = Buffer.allocUnsafe(Math.max(this.#buffer.length * 2, this.length + n));
		this.#buffer.copy(larger, 0, 0, this.length);
		this.#buffer = larger;
	}

	/** A whole number of either sign, zig-zag, seven bits a byte. */
	varint(x: number): void {
		this.#room(10);
		let n = x < 0 ? -2 * x - 1 : 2 * x;
		while (n >= 128) {
			this.#buffer[this.length++] = (n % 128) | 128;
			n = Math.floor(n / 128);
		}
		this.#buffer[this.length++] = n;
	}

	get view(): Buffer {
		return this.#buffer.subarray(0, this.length);
	}
}

class Reader {
	at = 0;
	constructor(readonly bytes: Uint8Array) {}

	varint(): number {
		let n = 0;
		let scale = 1;
		for (;;) {
			const byte = this.bytes[this.at++];
			if (byte === undefined) throw new RangeError('a block ends early');
			n += (byte & 127) * scale;
			if (byte < 128) break;
			scale *= 128;
		}
		return n % 2 === 0 ? n / 2 : -(n + 1) / 2;
	}
}

/** Times (whole ms UTC, any order) as bytes. */
export function encodeTimes(t: Float64Array): Buffer {
	const bytes = new Bytes(t.length + 16);
	bytes.varint(t.length);
	let before = 0;
	let step = 0;
	for (let i = 0; i < t.length; i++) {
		const at = t[i] ?? 0;
		if (!Number.isSafeInteger(at)) throw new RangeError(`time ${at} is no whole millisecond`);
		bytes.varint(at - before - step);
		step = i === 0 ? 0 : at - before;
		before = at;
	}
	return deflateRawSync(bytes.view, { level: LEVEL });
}

/** The times that {@link encodeTimes} coded. */
export function decodeTimes(coded: Uint8Array): Float64Array {
	const reader = new Reader(inflateRawSync(coded));
	const t = new Float64Array(reader.varint());
	let before = 0;
	let step = 0;
	for (let i = 0; i < t.length; i++) {
		const at = before + step + reader.varint();
		step = i === 0 ? 0 : at - before;
		t[i] = at;
		before = at;
	}
	return t;
}

function head(mode: number, n: number, places: number, scale: Scale): Buffer {
	const out = Buffer.allocUnsafe(22);
	out[0] = mode;
	out[1] = places;
	out.writeUInt32LE(n, 2);
	out.writeDoubleLE(scale.factor, 6);
	out.writeDoubleLE(scale.offset, 14);
	return out;
}

/** Runs of readings and of none, in turn, beginning with readings. */
function writeHoles(bytes: Bytes, v: Float64Array): void {
	const runs: number[] = [];
	let open = false;
	let from = 0;
	for (let i = 0; i < v.length; i++) {
		const x = v[i] as number;
		// Only NaN differs from itself.
		if ((x !== x) === open) continue;
		runs.push(i - from);
		from = i;
		open = !open;
	}
	runs.push(v.length - from);
	bytes.varint(runs.length);
	for (const run of runs) bytes.varint(run);
}

function readHoles(reader: Reader): Uint32Array {
	const runs = new Uint32Array(reader.varint());
	for (let i = 0; i < runs.length; i++) runs[i] = reader.varint();
	return runs;
}

/** Values as whole numbers of 10^−places in the file's figures, or null when one would not come back exactly. */
function encodeIntegers(v: Float64Array, places: number, scale: Scale): Buffer | null {
	const ten = 10 ** places;
	const { factor, offset } = scale;
	const scaled = ten / factor;
	const out = scratch(v.length * 8);
	let at = 0;
	let before = 0;
	for (let i = 0; i < v.length; i++) {
		const x = v[i] as number;
		if (x !== x) continue;
		const n = Math.round((x - offset) * scaled);
		if ((n / ten) * factor + offset !== x || n > MOST_INTEGER || n < -MOST_INTEGER || (n === 0 && Object.is(x, -0)))
			return null;
		const delta = n - before;
		before = n;
		let code = delta < 0 ? -2 * delta - 1 : 2 * delta;
		while (code >= 128) {
			out[at++] = (code % 128) | 128;
			code = Math.floor(code / 128);
		}
		out[at++] = code;
	}
	const holes = new Bytes(64);
	writeHoles(holes, v);
	const packed = deflateRawSync(Buffer.concat([holes.view, out.subarray(0, at)]), { level: LEVEL });
	return Buffer.concat([head(INTEGERS, v.length, places, scale), packed]);
}

let shared = Buffer.alloc(0);
/** A buffer to write into before packing, used again by the next block. */
function scratch(size: number): Buffer {
	if (shared.length < size) shared = Buffer.allocUnsafeSlow(size);
	return shared;
}

function shuffled(raw: Buffer, width: number): Buffer {
	const n = raw.length / width;
	const out = Buffer.allocUnsafe(raw.length);
	for (let k = 0; k < width; k++) for (let i = 0; i < n; i++) out[k * n + i] = raw[i * width + k] ?? 0;
	return out;
}

function unshuffled(raw: Uint8Array, width: number): Buffer {
	const n = raw.length / width;
	const out = Buffer.allocUnsafe(raw.length);
	for (let k = 0; k < width; k++) for (let i = 0; i < n; i++) out[i * width + k] = raw[k * n + i] ?? 0;
	return out;
}

function encodeFloats(v: Float64Array, width: 4 | 8): Buffer {
	const array = width === 4 ? Float32Array.from(v) : v.slice();
	const raw = shuffled(Buffer.from(array.buffer, array.byteOffset, array.byteLength), width);
	const packed = deflateRawSync(raw, { level: LEVEL });
	return Buffer.concat([head(width === 4 ? FLOAT32 : FLOAT64, v.length, 0, { factor: 1, offset: 0 }), packed]);
}

function isFloat32(v: Float64Array): boolean {
	return v.every((x) => Number.isNaN(x) || Object.is(Math.fround(x), x));
}

/** First figure of a block that never moves and has no hole, or null. */
function constantOf(v: Float64Array): number | null {
	const first = v[0];
	return first !== undefined && v.every((x) => Object.is(x, first)) ? first : null;
}

/**
 * Values as bytes.
 * @param scale how the file's figures became stored ones: their few digits code far smaller than converted values
 */
export function encodeValues(v: Float64Array, scale: Scale = { factor: 1, offset: 0 }): Buffer {
	const constant = constantOf(v);
	if (constant !== null) return head(CONSTANT, v.length, 0, { factor: 1, offset: constant });
	for (const candidate of [scale, { factor: 1, offset: 0 }]) {
		for (let places = 0; places <= MOST_PLACES; places++) {
			const coded = encodeIntegers(v, places, candidate);
			if (coded) return coded;
		}
	}
	return encodeFloats(v, isFloat32(v) ? 4 : 8);
}

/**
 * The values that {@link encodeValues} coded.
 * @throws RangeError when the bytes are no block
 */
export function decodeValues(coded: Uint8Array): Float64Array {
	if (coded.length < 22) throw new RangeError('a block is too short');
	const view = new DataView(coded.buffer, coded.byteOffset, coded.byteLength);
	const [mode, places, n] = [view.getUint8(0), view.getUint8(1), view.getUint32(2, true)];
	const [factor, offset] = [view.getFloat64(6, true), view.getFloat64(14, true)];
	if (mode === CONSTANT) return new Float64Array(n).fill(offset);
	const raw = inflateRawSync(coded.subarray(22));
	if (mode === INTEGERS) return decodeIntegers(new Reader(raw), n, 10 ** places, factor, offset);
	if (mode !== FLOAT32 && mode !== FLOAT64) throw new RangeError(`a block of an unknown kind, ${mode}`);
	const bytes = unshuffled(raw, mode === FLOAT32 ? 4 : 8);
	const out = new Float64Array(n);
	for (let i = 0; i < n; i++) out[i] = mode === FLOAT32 ? bytes.readFloatLE(i * 4) : bytes.readDoubleLE(i * 8);
	return out;
}

function decodeIntegers(reader: Reader, n: number, ten: number, factor: number, offset: number): Float64Array {
	const runs = readHoles(reader);
	const out = new Float64Array(n);
	let at = 0;
	let figure = 0;
	for (let r = 0; r < runs.length; r++) {
		const end = at + (runs[r] ?? 0);
		if (r % 2 === 1) out.fill(NaN, at, end);
		else {
			for (let i = at; i < end; i++) {
				figure += reader.varint();
				out[i] = (figure / ten) * factor + offset;
			}
		}
		at = end;
	}
	return out;
}
