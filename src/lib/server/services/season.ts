import type { Actor } from '$lib/model/people';
import { MEASURES, apiMeasure, type Quantity, type UnitSystem } from '$lib/model/quantities';
import type { Season } from '$lib/model/wire/season';
import { rollingSeason, type OffsetReading, type SeasonTrace } from '$lib/server/analysis/season';
import { nightsOf } from '$lib/server/analysis/nights/nights';
import { listStarts } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { circuitInputs } from './analysing';
import { inUnits, unitsObject } from './start-shapes';
import { visibleUnit } from './units';

const SEASON_MS = 91 * 86_400_000;
/** Rest tests that read an offset between two sensors: these drift. */
const OFFSETS = /offset|sensor/i;

/** How a heading names what is followed; a resting offset is named by its two sensors. */
const SPOKEN: Readonly<Record<string, string>> = {
	evapApproach: 'The evaporator approach',
	condApproach: 'The condenser approach',
	settledMargin: 'The settled margin',
	settledOilTemp: 'The settled oil temperature',
	settledSubcooling: 'The subcooling',
	superheat: 'The superheat',
	startCapacity: 'The capacity at start',
	minEvapSaturation: 'The least evaporator saturation'
};

/** The finding: what moved most over the season, with its figures as the person reads them. */
function titleOf(traces: readonly SeasonTrace[], system: UnitSystem): string {
	const first = traces[0];
	if (first && first.weight > 0) {
		const name = SPOKEN[first.key] ?? `At rest, ${first.label}`;
		const unit = MEASURES[apiMeasure(first.quantity, system)].symbol.replace(' diff.', '');
		const say = (value: number) => value.toFixed(first.quantity === 'percent' ? 0 : 1).replace('-', '−');
		const { change, driftPerWeek, weeks } = first;
		if (driftPerWeek !== null) {
			const over = Math.abs(changeBy(driftPerWeek, first.quantity, system) * (weeks.length - 1));
			return `${name} ${driftPerWeek > 0 ? 'rose' : 'fell'} by ${say(over)} ${unit} in ${weeks.length} weeks`;
		}
		if (change) {
			const [before, after] = [change.before, change.after].map((value) => say(inUnits(value, first.quantity, system)));
			return `${name} went from ${before} to ${after} ${unit} in the week of ${change.week}`;
		}
	}
	return traces.some((trace) => trace.weeks.length > 2)
		? 'Nothing drifts and nothing took a new level in these weeks'
		: 'Too few weeks to see a drift';
}

/** A slope or a shift of a temperature converts as a difference. */
const changeBy = (value: number, quantity: Quantity, system: UnitSystem): number =>
	value * MEASURES[apiMeasure(quantity, system)].factor;

/** The rolling season of a circuit. */
export async function seasonOf(actor: Actor, unitId: string, circuit: string, system: UnitSystem): Promise<Season> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { unit, site } = await visibleUnit(tx, actor, unitId);
		const rows = await listStarts(tx, [unitId], { circuit });
		const last = rows.at(-1)?.startedAt ?? 0;
		const records = rows.map((row) => row.record).filter((record) => record.startedAt >= last - SEASON_MS);
		const input = (await circuitInputs(tx, unit, site)).find((entry) => entry.circuit === circuit);
		const nights = input ? nightsOf(input, records) : { rests: [], tests: [] };
		const labels = new Map(nights.tests.map((test) => [test.key, test.label]));
		const offsets: OffsetReading[] = nights.rests.flatMap((rest) =>
			rest.results.flatMap(({ key, value, quantity }) =>
				value !== null && quantity === 'temperatureDifference' && OFFSETS.test(key)
					? [{ key, label: labels.get(key) ?? key, at: rest.from, value }]
					: []
			)
		);
		const traces = rollingSeason(records, site.timeZone, offsets);
		const shaped = traces.map((trace) => ({
			...trace,
			weeks: trace.weeks.map((week) => ({ ...week, value: inUnits(week.value, trace.quantity, system) })),
			change: trace.change && {
				week: trace.change.week,
				before: inUnits(trace.change.before, trace.quantity, system),
				after: inUnits(trace.change.after, trace.quantity, system)
			},
			driftPerWeek: trace.driftPerWeek === null ? null : changeBy(trace.driftPerWeek, trace.quantity, system)
		}));
		return { title: titleOf(traces, system), traces: shaped, units: unitsObject(system) };
	});
}
