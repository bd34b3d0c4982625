import type { TraceKey } from './signals';

/** Which signal left the held starts' band first, as it is kept with a start: stored units, seconds from the start. */
export type KeptFirstMover = {
	sentence: string;
	cannotTell: string | null;
	heldStarts: number;
	fromSeconds: number;
	tripAtSeconds: number | null;
	departures: {
		signal: string;
		label: string;
		atSeconds: number;
		errorSeconds: number;
		direction: 'above' | 'below';
	}[];
	/** null where the band cannot be had (JSON has no NaN) */
	bands: { signal: TraceKey; t: number[]; low: (number | null)[]; high: (number | null)[] }[];
};
