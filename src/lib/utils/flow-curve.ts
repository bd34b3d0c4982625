import type { FlowCurve } from '../model/unit';

/**
 * Water flow (L/s) from the pressure drop over a shell (kPa) through the maker's curve. Between and beyond points the
 * flow follows a power of the drop (a straight line in logarithms); one point alone follows the square root, as
 * turbulent flow does (textbook law, from memory).
 * @returns null without points, for a drop that is not positive, or more than a factor two outside the curve's drops
 */
export function flowFromDrop(drop: number, curve: FlowCurve): number | null {
	const points = [...curve].sort((a, b) => a.drop - b.drop);
	const first = points[0];
	const last = points.at(-1);
	if (!first || !last || !(drop > 0)) return null;
	if (drop < first.drop / 2 || drop > last.drop * 2) return null;
	const above = points.findIndex((point) => point.drop >= drop);
	const high = points[above < 1 ? Math.min(1, points.length - 1) : above] ?? last;
	const low = points[points.indexOf(high) - 1];
	if (!low || low.drop === high.drop) return high.flow * Math.sqrt(drop / high.drop);
	const power = Math.log(high.flow / low.flow) / Math.log(high.drop / low.drop);
	return low.flow * (drop / low.drop) ** power;
}
