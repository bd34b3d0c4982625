import type { FigureKey } from '$lib/model/start';
import type { SuspectKey } from '$lib/model/suspect';
import type { Start } from '$lib/model/wire/start';
import type { OutcomePoint } from '$lib/utils/outcome-dots';

/** The figure that shows a suspect best when every start is laid along it. */
const FIGURE_OF: Readonly<Partial<Record<SuspectKey, FigureKey>>> = {
	'cold-condenser-water': 'condWaterInAtStart',
	'low-pressure-difference': 'systemDeltaAt60s',
	'slide-not-unloading': 'startCapacity',
	'low-oil': 'startCapacity',
	'slide-not-loading': 'peakCapacity',
	'refrigerant-migration': 'oilLiftAtStart',
	'valve-underfeeding': 'maxValvePosition',
	'plant-staging': 'waterOutAtStart',
	'fouled-condenser': 'condApproach',
	'fouled-evaporator': 'evapApproach',
	'low-refrigerant-charge': 'settledSubcooling',
	'oil-restriction': 'settledMargin'
};

/**
 * Starts laid along a suspect's figure, tripped and held.
 * @returns null without a figure for it, or where not both a tripped and a held start have it
 */
export function outcomeFigure(
	suspect: string,
	starts: Iterable<Start>
): { figure: FigureKey; points: OutcomePoint[] } | null {
	const figure = FIGURE_OF[suspect as SuspectKey];
	if (!figure) return null;
	const points: OutcomePoint[] = [];
	for (const { id, outcome, attended, figures } of starts) {
		const value = figures[figure];
		if (attended || (outcome !== 'tripped' && outcome !== 'held') || typeof value !== 'number') continue;
		points.push({ id, value, tripped: outcome === 'tripped' });
	}
	const trips = points.filter(({ tripped }) => tripped).length;
	return trips > 0 && trips < points.length ? { figure, points } : null;
}
