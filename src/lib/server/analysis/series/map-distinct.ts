/** So many distinct values are remembered; a column of full-precision figures has no use for more. */
const MOST = 20_000;

/**
 * A function over values, worked out once for each distinct one: a logged figure has few digits, so a season of samples
 * holds some hundred of them. `f` must depend on nothing else. NaN stays NaN. O(values).
 */
export function mapDistinct(values: Float64Array, f: (value: number) => number): Float64Array {
	const known = new Map<number, number>();
	const out = new Float64Array(values.length);
	let last = NaN;
	let lastOut = NaN;
	for (let i = 0; i < values.length; i++) {
		const value = values[i] as number;
		if (value !== last) {
			last = value;
			const found = Number.isNaN(value) ? NaN : known.get(value);
			lastOut = found ?? f(value);
			if (found === undefined && known.size < MOST) known.set(value, lastOut);
		}
		out[i] = lastOut;
	}
	return out;
}
