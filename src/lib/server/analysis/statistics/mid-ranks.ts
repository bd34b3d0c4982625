/** Ranks 1…n of finite values, equal values sharing the mean of their ranks. */
export function midRanks(values: readonly number[]): number[] {
	const order = values.map((_, i) => i).sort((i, j) => (values[i] ?? 0) - (values[j] ?? 0));
	const ranks = new Array<number>(values.length).fill(0);
	for (let from = 0; from < order.length;) {
		let to = from + 1;
		while (to < order.length && values[order[to] ?? 0] === values[order[from] ?? 0]) to++;
		for (let k = from; k < to; k++) ranks[order[k] ?? 0] = (from + 1 + to) / 2;
		from = to;
	}
	return ranks;
}
