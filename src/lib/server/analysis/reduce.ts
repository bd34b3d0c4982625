/** A trace thinned for drawing: instants in ms and values, NaN for a break. */
export type Reduced = { t: Float64Array; v: Float64Array };

/**
 * Thins a trace for `columns` equal stretches of time while keeping every extreme: each stretch gives its first, least,
 * most and last reading, in their order, and a break (NaN) where it holds one. A trace with no more readings than that
 * would give is returned as it is.
 *
 * @param t ms, strictly rising
 * @param v values, NaN = no reading
 * @param columns at least 1
 * @throws RangeError for fewer columns than 1, or arrays of different lengths
 * Source: the M4 aggregation of Jugel et al., Proc. VLDB Endowment 7 (2014) 797 (from memory).
 */
export function reduceTrace(t: Float64Array, v: Float64Array, columns: number): Reduced {
	if (columns < 1) throw new RangeError('a trace needs one column at least');
	if (t.length !== v.length) throw new RangeError('a trace needs as many values as instants');
	const first = t[0] ?? 0;
	const last = t.at(-1) ?? 0;
	if (t.length <= columns * 5 || last <= first) return { t, v };
	const scale = columns / (last - first);
	const kept = new Int32Array(columns * 5 + 5);
	let count = 0;
	for (let from = 0; from < t.length;) {
		const column = Math.min(columns - 1, Math.floor(((t[from] ?? 0) - first) * scale));
		let to = from + 1;
		while (to < t.length && Math.min(columns - 1, Math.floor(((t[to] ?? 0) - first) * scale)) === column) to++;
		count = keepStretch(v, from, to, kept, count);
		from = to;
	}
	const out: Reduced = { t: new Float64Array(count), v: new Float64Array(count) };
	for (let i = 0; i < count; i++) {
		const at = kept[i] ?? 0;
		out.t[i] = t[at] ?? 0;
		out.v[i] = v[at] ?? NaN;
	}
	return out;
}

/** Notes the telling places of one stretch in rising order; gives the new count. */
function keepStretch(v: Float64Array, from: number, to: number, kept: Int32Array, count: number): number {
	let least = -1;
	let most = -1;
	let gap = -1;
	for (let i = from; i < to; i++) {
		const value = v[i] ?? NaN;
		if (Number.isNaN(value)) gap = gap < 0 ? i : gap;
		else {
			if (least < 0 || value < (v[least] ?? 0)) least = i;
			if (most < 0 || value > (v[most] ?? 0)) most = i;
		}
	}
	const places = [...new Set([from, least, most, gap, to - 1])].filter((place) => place >= 0).sort((a, b) => a - b);
	for (const place of places) kept[count++] = place;
	return count;
}
