import { FIGURE_KEYS, type FigureKey, type Outcome, type StartRecord, type TripKind } from './start';

/** What an earlier version of the method had said of a start, where the present one says otherwise. */
export type PreviousMethod = {
	methodVersion: string;
	outcome: Outcome;
	tripKind: TripKind | null;
	stall: 'stall' | 'limited' | 'cannot-tell' | null;
	/** The figures that differ, in stored units, as they were. */
	figures: Partial<Record<FigureKey, number | null>>;
};

/** Figures that differ by no more than this share are the same figure computed in another order. */
const SAME = 1e-6;

function differ(a: number | null | undefined, b: number | null | undefined): boolean {
	const [x, y] = [a ?? null, b ?? null];
	if (x === null || y === null) return x !== y;
	return Math.abs(x - y) > SAME * Math.max(1, Math.abs(x), Math.abs(y));
}

/**
 * What stands differently in a start's record of an earlier method version.
 * @returns null when both are of one version, or say the same
 */
export function previousOf(before: StartRecord, now: StartRecord): PreviousMethod | null {
	if (before.methodVersion === now.methodVersion) return null;
	const changed = FIGURE_KEYS.filter((key) => differ(before.figures[key], now.figures[key]));
	const told = (record: StartRecord) => [record.outcome, record.trip?.kind ?? null, record.stall?.verdict ?? null];
	const alike = told(before).every((value, i) => value === told(now)[i]);
	if (alike && changed.length === 0) return null;
	return {
		methodVersion: before.methodVersion,
		outcome: before.outcome,
		tripKind: before.trip?.kind ?? null,
		stall: before.stall?.verdict ?? null,
		figures: Object.fromEntries(changed.map((key) => [key, before.figures[key] ?? null]))
	};
}
