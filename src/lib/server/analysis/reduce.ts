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
	const width = (last - first) / columns;
	const kept = new Int32Array(columns * 5 + 5);
	let count = 0;
	let column = 0;
	for (let from = 0; from < t.length;) {
		// The stretch this reading lies in; empty ones are passed over.
		while (column < columns - 1 && (t[from] ?? 0) >= first + (column + 1) * width) column++;
		const end = column === columns - 1 ? Infinity : first + (column + 1) * width;
		let to = from + 1;
		while (to < t.length && (t[to] ?? 0) < end) to++;
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
	let low = Infinity;
	let high = -Infinity;
	for (let i = from; i < to; i++) {
		const value = v[i] ?? NaN;
		if (value < low) {
			low = value;
			least = i;
		}
		if (value > high) {
			high = value;
			most = i;
		}
		if (value !== value && gap < 0) gap = i;
	}
	const places = [...new Set([from, least, most, gap, to - 1])].filter((place) => place >= 0).sort((a, b) => a - b);
	for (const place of places) kept[count++] = place;
	return count;
}
