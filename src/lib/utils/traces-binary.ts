import type { Traces } from '$lib/model/wire/views';

/** Media type of the compact form of {@link Traces} that the pages ask for. */
export const TRACES_BINARY = 'application/vnd.firstpull.traces';

/** {@link Traces} with typed arrays: `t` ms UTC as float64, `v` float32 with NaN for a break. */
export type BinaryTraces = Omit<Traces, 'traces'> & {
	traces: (Omit<Traces['traces'][number], 't' | 'v'> & { t: Float64Array; v: Float32Array })[];
};

const ALIGN = 8;
const aligned = (n: number): number => Math.ceil(n / ALIGN) * ALIGN;

/**
 * Packs traces as: uint32 (little-endian) length of a JSON head, the head padded with spaces to 8 bytes,
 * then per trace its `t` (float64) and `v` (float32, padded to 8 bytes). The head holds everything else and each `count`.
 */
export function packTraces(traces: BinaryTraces): Uint8Array<ArrayBuffer> {
	const head = { ...traces, traces: traces.traces.map(({ t, v: _v, ...rest }) => ({ ...rest, count: t.length })) };
	const json = new TextEncoder().encode(JSON.stringify(head));
	const headLength = aligned(4 + json.length) - 4;
	let size = 4 + headLength;
	for (const { t } of traces.traces) size += t.length * 8 + aligned(t.length * 4);
	const out = new Uint8Array(size);
	new DataView(out.buffer).setUint32(0, headLength, true);
	out.fill(0x20, 4, 4 + headLength);
	out.set(json, 4);
	let offset = 4 + headLength;
	for (const { t, v } of traces.traces) {
		new Float64Array(out.buffer, offset, t.length).set(t);
		offset += t.length * 8;
		new Float32Array(out.buffer, offset, v.length).set(v);
		offset += aligned(v.length * 4);
	}
	return out;
}

/**
 * The other way round; the typed arrays are views into `buffer`.
 * @throws RangeError when the buffer is shorter than its head says
 */
export function unpackTraces(buffer: ArrayBuffer): BinaryTraces {
	const headLength = new DataView(buffer).getUint32(0, true);
	const head = JSON.parse(new TextDecoder().decode(new Uint8Array(buffer, 4, headLength))) as Omit<Traces, 'traces'> & {
		traces: (Omit<Traces['traces'][number], 't' | 'v'> & { count: number })[];
	};
	let offset = 4 + headLength;
	const traces = head.traces.map(({ count, ...rest }) => {
		const t = new Float64Array(buffer, offset, count);
		offset += count * 8;
		const v = new Float32Array(buffer, offset, count);
		offset += aligned(count * 4);
		return { ...rest, t, v };
	});
	return { ...head, traces };
}
