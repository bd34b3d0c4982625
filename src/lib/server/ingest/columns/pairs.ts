import type { ColumnSample } from './sample';

/** Readings of columns not of one row still belong together when this close, ms: waters and saturations move slowly. */
const CLOSE = 5 * 60_000;

/** Indices into two columns' readings that belong to one instant. */
export function pairUp(a: ColumnSample, b: ColumnSample): [number, number][] {
	const pairs: [number, number][] = [];
	if (a.t === b.t) {
		for (let i = 0; i < a.t.length; i++) pairs.push([i, i]);
		return pairs;
	}
	const order = b.t.map((t, i) => [t, i] as const).sort((x, y) => x[0] - y[0]);
	for (let i = 0; i < a.t.length; i++) {
		const t = a.t[i] ?? NaN;
		let lo = 0;
		let hi = order.length;
		while (lo < hi) {
			const mid = (lo + hi) >> 1;
			if ((order[mid]?.[0] ?? Infinity) < t) lo = mid + 1;
			else hi = mid;
		}
		const near = [order[lo - 1], order[lo]].filter((o) => o !== undefined);
		const best = near.sort((x, y) => Math.abs(x[0] - t) - Math.abs(y[0] - t))[0];
		if (best && Math.abs(best[0] - t) <= CLOSE) pairs.push([i, best[1]]);
	}
	return pairs;
}

/** Pairs of readings that are both there. */
export function pairedValues(a: ColumnSample, b: ColumnSample): [number, number][] {
	return pairUp(a, b)
		.map(([i, k]): [number, number] => [a.v[i] ?? NaN, b.v[k] ?? NaN])
		.filter(([x, y]) => !Number.isNaN(x) && !Number.isNaN(y));
}
