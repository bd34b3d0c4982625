import { DERIVED, type Family, isSignalKey, SIGNALS, type TraceKey } from '$lib/model/signals';

/** How a trace is inked: one family, one dash; the ghost the same line, lighter and thinner. */
export type TraceStyle = { family: Family; width: number; dash: string | null };

const FAMILY: Readonly<Record<Family, Omit<TraceStyle, 'family'>>> = {
	load: { width: 2, dash: null },
	low: { width: 1.9, dash: '13 2.5' },
	water: { width: 1.6, dash: '6 3' },
	high: { width: 1.6, dash: '10 2.5 2 2.5' },
	oil: { width: 1.9, dash: '10 2 2 2 2 2' },
	electrical: { width: 1.8, dash: '2.5 2' }
};

/** Second lines of a family that shares a strip: told apart by their dash. */
const OWN: Partial<Record<TraceKey, Omit<TraceStyle, 'family'>>> = {
	demand: { width: 1.4, dash: '1.2 3' },
	evapWaterIn: { width: 1.2, dash: '6 3 1.5 3' },
	condWaterOut: { width: 1.6, dash: '6 3 1.5 3' },
	waterSetpoint: { width: 1, dash: '1.5 4' },
	condFlow: { width: 1.6, dash: '6 3 1.5 3' },
	dischargeSuperheat: { width: 1.3, dash: '10 2.5 2 2.5' }
};

export const GHOST_WIDTH = 1.1;

/** The family of a signal or of a derived quantity. */
export function familyOf(key: TraceKey): Family {
	return isSignalKey(key) ? SIGNALS[key].family : DERIVED[key].family;
}

export function traceStyle(key: TraceKey): TraceStyle {
	const family = familyOf(key);
	return { family, ...(OWN[key] ?? FAMILY[family]) };
}

/** CSS colour of a family's ink, or of its ghost. */
export function inkOf(family: Family, ghost = false): string {
	return ghost ? `var(--ghost-${family})` : `var(--${family})`;
}
