/** Indices that put times in rising order, or null when they rise strictly already. Equal times keep their order. */
export function risingOrder(t: Float64Array, n: number): Uint32Array | null {
	let rising = true;
	for (let i = 1; i < n && rising; i++) rising = (t[i] ?? 0) > (t[i - 1] ?? 0);
	if (rising) return null;
	const order = Uint32Array.from({ length: n }, (_, i) => i);
	return order.sort((a, b) => (t[a] ?? 0) - (t[b] ?? 0) || a - b);
}

/** Times of an order with repeats joined, and for each row of the order the slot it goes to. */
export function joinRepeats(t: Float64Array, order: Uint32Array): { t: Float64Array; slot: Uint32Array } {
	const out = new Float64Array(order.length);
	const slot = new Uint32Array(order.length);
	let n = 0;
	for (let i = 0; i < order.length; i++) {
		const at = t[order[i] ?? 0] ?? NaN;
		if (n === 0 || out[n - 1] !== at) out[n++] = at;
		slot[i] = n - 1;
	}
	return { t: out.slice(0, n), slot };
}

/** Values put where their times went; of repeats the later row wins, unless it has no reading. */
export function reorder(v: Float64Array, order: Uint32Array, slot: Uint32Array, n: number): Float64Array {
	const out = new Float64Array(n).fill(NaN);
	for (let i = 0; i < order.length; i++) {
		const x = v[order[i] ?? 0] ?? NaN;
		if (!Number.isNaN(x)) out[slot[i] ?? 0] = x;
	}
	return out;
}
