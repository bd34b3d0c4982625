export type OutcomePoint = { id: string; value: number; tripped: boolean };
export type PlacedPoint = OutcomePoint & { x: number; y: number };

/**
 * A dot plot of starts on one value axis, px: tripped ones hang from the top, held ones stand on the floor, those that
 * fall into one column are stacked. A stack that would leave its half of the plot is drawn closer, none is left out.
 * @param x px of a value
 * @param column px of one column
 */
export function outcomeDots(
	points: readonly OutcomePoint[],
	x: (value: number) => number,
	size: { height: number; column: number; bar: number; dot: number }
): PlacedPoint[] {
	const { height, column, bar, dot } = size;
	const columns = new Map<string, OutcomePoint[]>();
	for (const point of points) {
		const key = `${point.tripped} ${Math.round(x(point.value) / column)}`;
		columns.set(key, [...(columns.get(key) ?? []), point]);
	}
	const most = Math.max(1, ...[...columns.values()].map((stack) => stack.length));
	const half = height / 2;
	return [...columns.values()].flatMap((stack) =>
		stack.map((point, k) => {
			const own = point.tripped ? bar : dot;
			const step = Math.min(own + 1, (half - own) / Math.max(1, most - 1));
			const offset = 3 + own / 2 + k * step;
			const at = Math.round(x(point.value) / column) * column;
			return { ...point, x: at, y: point.tripped ? offset : height - offset };
		})
	);
}
