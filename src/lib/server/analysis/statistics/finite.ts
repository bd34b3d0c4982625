/** The finite values of `values`, in order, as a new array; NaN ("no reading") and infinities are left out. */
export function finite(values: Iterable<number>): number[] {
	const kept: number[] = [];
	for (const value of values) if (Number.isFinite(value)) kept.push(value);
	return kept;
}

/** The finite values of `values`, smallest first, as a new array. */
export function sortedFinite(values: Iterable<number>): number[] {
	return finite(values).sort((a, b) => a - b);
}
