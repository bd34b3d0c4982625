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

function titleOf(traces: readonly SeasonTrace[]): string {
	const changed = traces.filter((trace) => trace.change !== null);
	const drifting = traces.filter((trace) => trace.driftPerWeek !== null);
	const first = changed[0];
	if (first?.change) return `${first.label} took a new level in the week of ${first.change.week}`;
	if (drifting[0]) return `${drifting[0].label} drifts from week to week`;
	return traces.some((trace) => trace.weeks.length > 2)
		? 'No new level and no drift in these weeks'
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
		return { title: titleOf(traces), traces: shaped, units: unitsObject(system) };
	});
}
