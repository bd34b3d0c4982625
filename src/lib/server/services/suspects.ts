import { AppError } from '$lib/model/errors';
import { may, type Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import type { SuspectsResult } from '$lib/model/suspect';
import type { Suspects } from '$lib/model/wire/start';
import { SUSPECT_WORDS } from '$lib/model/words';
import { evaluateSuspects, nextChecks } from '$lib/server/analysis/suspects';
import { listSignedSuspects } from '$lib/server/repositories/circle';
import { listCircuitResults, listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { circuitInputs } from './analysing';
import { factsOf } from './facts';
import { unitsObject } from './start-shapes';
import { visibleUnit } from './units';

type Query = { from?: string; to?: string; circuit?: string };
export type CircuitSuspects = { circuit: string } & SuspectsResult;

const ORDER = ['fault-pattern', 'cannot-tell', 'no-fault-pattern'] as const;

/** Suspects as stored by the last analysis, or evaluated anew over a period. */
async function resultsOf(
	tx: Tx,
	actor: Actor,
	unitId: string,
	query: Query,
	rows: readonly StartRow[],
	system: UnitSystem
): Promise<CircuitSuspects[]> {
	const { unit, site } = await visibleUnit(tx, actor, unitId);
	if (!query.from && !query.to) {
		return (await listCircuitResults(tx, [unitId])).map((row) => ({ circuit: row.circuit, ...row.suspects[system] }));
	}
	const from = query.from ? Date.parse(query.from) : -Infinity;
	const to = query.to ? Date.parse(query.to) : Infinity;
	const facts = await factsOf(tx, unitId);
	return (await circuitInputs(tx, unit, site)).map((input) => {
		const starts = rows
			.filter((row) => row.circuit === input.circuit && row.startedAt >= from && row.startedAt <= to)
			.map((row) => row.record);
		return { circuit: input.circuit, ...evaluateSuspects({ input, starts, ...facts(input.circuit), units: system }) };
	});
}

/** Clues name their starts by instant; the API names them by id. */
function suspectsShape(result: CircuitSuspects, rows: readonly StartRow[]): Suspects['suspects'] {
	const ids = new Map(rows.filter((row) => row.circuit === result.circuit).map((row) => [row.startedAt, row.id]));
	return result.suspects.map((suspect) => ({
		...suspect,
		name: SUSPECT_WORDS[suspect.key],
		clues: suspect.clues.map((clue) => ({ ...clue, starts: clue.starts.flatMap((at) => ids.get(at) ?? []) }))
	}));
}

/** What to check next; nothing on a sound unit, and nothing for a client, who does no checks. */
function nextChecksShape(result: CircuitSuspects, all: boolean): Suspects['nextChecks'] {
	if (!all || result.verdict === 'no-fault-pattern') return [];
	return nextChecks(result.suspects).map((check) => ({
		...check,
		decides: check.decides.map((key) => SUSPECT_WORDS[key])
	}));
}

/**
 * The ranked suspects of a unit, circuit by circuit; the top is that of the worst circuit, or of the one asked for.
 * @throws AppError `forbidden` for a client while no technician has signed a deciding check
 */
export async function suspectsOf(actor: Actor, unitId: string, query: Query, system: UnitSystem): Promise<Suspects> {
	return withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		const signed = new Set((await listSignedSuspects(tx, [unitId])).map((row) => row.suspect));
		const all = may(actor, 'readSuspects');
		if (!all && signed.size === 0)
			throw new AppError('forbidden', 'Suspects are shown once a technician has signed the deciding check.');
		const rows = await listStarts(tx, [unitId]);
		const results = await resultsOf(tx, actor, unitId, query, rows, system);
		const circuits = results.map((result) => {
			const suspects = suspectsShape(result, rows);
			return {
				circuit: result.circuit,
				verdict: result.verdict,
				missingSignals: result.missingSignals,
				suspects: all ? suspects : suspects.filter(({ key }) => signed.has(key)),
				nextChecks: nextChecksShape(result, all)
			};
		});
		const worst = query.circuit
			? circuits.find((entry) => entry.circuit === query.circuit)
			: ORDER.flatMap((verdict) => circuits.filter((entry) => entry.verdict === verdict))[0];
		return {
			verdict: worst?.verdict ?? 'cannot-tell',
			suspects: worst?.suspects ?? [],
			missingSignals: worst?.missingSignals ?? [],
			nextChecks: worst?.nextChecks ?? [],
			circuits: circuits.map(({ circuit, verdict, suspects }) => ({ circuit, verdict, suspects })),
			units: unitsObject(system)
		};
	});
}
