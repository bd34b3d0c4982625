import type { CircuitInput } from '$lib/model/circuit-input';
import type { Actor } from '$lib/model/people';
import type { Quantity, UnitSystem } from '$lib/model/quantities';
import { signalOf, type SeriesId, type SignalKey } from '$lib/model/signals';
import type { Nights } from '$lib/model/wire/nights';
import { nightsOf as readNights } from '$lib/server/analysis/nights/nights';
import type { NightsResult } from '$lib/server/analysis/nights/types';
import { tonightsLog } from '$lib/server/analysis/logging-advice';
import { listCircuitResults, listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { circuitInputs } from './analysing';
import { inUnits, iso, unitsObject } from './start-shapes';
import { visibleUnit } from './units';

function titleOf({ tests, rests }: NightsResult): string {
	const failed = tests.filter((test) => test.result === 'failed');
	if (rests.length === 0) return 'No rest of half an hour is in these logs yet';
	const first = failed[0];
	if (first)
		return failed.length === 1
			? `${first.label}: ${first.sentence}`
			: `${failed.length} of the rest tests failed, ${first.label} first`;
	return tests.some((test) => test.result === 'passed')
		? 'The rests show nothing wrong'
		: 'These rests cannot be read as a test';
}

function nightsShape(
	result: NightsResult,
	rows: readonly StartRow[],
	system: UnitSystem
): Omit<Nights, 'tonight' | 'units'> {
	const ids = new Map(rows.map((row) => [row.startedAt, row.id]));
	const say = (value: number | null, quantity: Quantity) => (value === null ? null : inUnits(value, quantity, system));
	return {
		title: titleOf(result),
		tests: result.tests.map((test) => ({ ...test, value: say(test.value, test.quantity) })),
		rests: result.rests.toReversed().map((rest) => ({
			from: iso(rest.from),
			to: iso(rest.to),
			startId: rest.startAt === null ? null : (ids.get(rest.startAt) ?? null),
			results: rest.results.map((reading) => ({ ...reading, value: say(reading.value, reading.quantity) }))
		}))
	};
}

const loggedSignals = (input: CircuitInput): Set<SignalKey> =>
	new Set((Object.keys(input.series) as SeriesId[]).map(signalOf));

/** What a circuit's rests say, and what to log until tomorrow. */
export async function nightsOf(actor: Actor, unitId: string, circuit: string, system: UnitSystem): Promise<Nights> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { unit, site } = await visibleUnit(tx, actor, unitId);
		const rows = await listStarts(tx, [unitId], { circuit });
		const input = (await circuitInputs(tx, unit, site)).find((entry) => entry.circuit === circuit);
		const records = rows.map((row) => row.record);
		const result = input ? readNights(input, records) : { rests: [], tests: [] };
		const suspects =
			(await listCircuitResults(tx, [unitId])).find((row) => row.circuit === circuit)?.suspects[system] ?? null;
		return {
			...nightsShape(result, rows, system),
			tonight:
				input && suspects
					? tonightsLog({ suspects, nature: unit.nature, starts: records, logged: loggedSignals(input) })
					: null,
			units: unitsObject(system)
		};
	});
}
