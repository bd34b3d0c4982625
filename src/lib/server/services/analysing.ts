import { METHOD_VERSION, type CircuitAnalysis, type CircuitInput, type TripWord } from '$lib/model/circuit-input';
import type { UnitSystem } from '$lib/model/quantities';
import type { Series } from '$lib/model/series';
import type { StartRecord } from '$lib/model/start';
import type { SuspectsResult } from '$lib/model/suspect';
import { analyseCircuit } from '$lib/server/analysis/analyse-circuit';
import { notedStarts } from '$lib/server/analysis/noted/noted-starts';
import { firstMoverOf, matchedHeld } from '$lib/server/analysis/first-mover/first-mover';
import { cluesOfStart, evaluateSuspects, type SuspectEvidence } from '$lib/server/analysis/suspects';
import { factsOf } from './facts';
import { keepFirstMover } from './first-mover-shapes';
import { listVisitSpans } from '$lib/server/repositories/circle';
import { listTripWords } from '$lib/server/repositories/trip-words';
import type { Window } from '$lib/server/repositories/blocks';
import { listLogs, listLogStates, updateLog, withLock } from '$lib/server/repositories/logs';
import { listNoted } from '$lib/server/repositories/noted';
import { findSite, findUnit, listLimits, listUnits, type SiteRow, type UnitRow } from '$lib/server/repositories/plant';
import {
	listCircuitResults,
	listCorrections,
	replaceStarts,
	saveCircuitResult,
	type StartRow
} from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { limitsOf } from './plant-shapes';
import { loadEvents, loadSeries, loadTexts } from './series';

/** Recomputes what a unit's logs say: starts, figures and suspects, circuit by circuit. */

type Job = { organisationId: string; unitId: string };
const NO_EXTRAS: StartRow['extras'] = { clues: { si: [], ip: [] }, firstMover: null };

export const circuitsOf = (unit: { circuits: number }): string[] =>
	Array.from({ length: unit.circuits }, (_, i) => String(i + 1));

/** `running` of the site's other machines: power failures and staging show across them. */
async function runningOfOthers(tx: Tx, site: SiteRow, unit: UnitRow): Promise<CircuitInput['others'][number][]> {
	const others = [];
	for (const other of await listUnits(tx, site.id)) {
		const maps = await loadSeries(tx, other.id, circuitsOf(other), { signals: ['running'] });
		for (const [circuit, map] of maps) {
			const running: Series | undefined = map.running;
			if (running) others.push({ name: `${other.id} ${circuit}`, sameUnit: other.id === unit.id, running });
		}
	}
	return others;
}

/** Everything the analysis of one unit's circuits needs, from the store: of all its logs, or of a window. */
export async function circuitInputs(tx: Tx, unit: UnitRow, site: SiteRow, window?: Window): Promise<CircuitInput[]> {
	const circuits = circuitsOf(unit);
	const maps = await loadSeries(tx, unit.id, circuits, window ? { window } : {});
	const texts = await loadTexts(tx, unit.id, circuits, window);
	const limits = limitsOf(await listLimits(tx, [unit.id]));
	const corrections = (await listCorrections(tx, unit.id)).map((row) => row.correction);
	const visits = await listVisitSpans(tx, unit.id);
	const tripWords: TripWord[] = (await listTripWords(tx, unit.id)).map(({ words, kind }) => ({ words, kind }));
	const others = await runningOfOthers(tx, site, unit);
	const inputs: CircuitInput[] = [];
	for (const circuit of circuits) {
		inputs.push({
			circuit,
			series: maps.get(circuit) ?? {},
			texts: texts.get(circuit) ?? {},
			events: await loadEvents(tx, unit.id, circuit, window),
			nature: unit.nature,
			refrigerant: unit.refrigerant,
			timeZone: site.timeZone,
			limits,
			visits,
			tripWords,
			corrections: corrections.filter((correction) => correction.circuit === circuit),
			others: others.filter((other) => other.name !== `${unit.id} ${circuit}`)
		});
	}
	return inputs;
}

type Made = { record: StartRecord; extras: StartRow['extras'] };
type Computed = {
	made: Made[];
	analysis: CircuitAnalysis;
	suspects: Record<UnitSystem, SuspectsResult>;
};

/** Clues are read for the starts that went wrong; a sound start's sheet needs none. */
function extrasOf(evidence: SuspectEvidence, record: StartRecord): StartRow['extras'] {
	const telling = record.outcome === 'tripped' || record.stall?.verdict === 'stall';
	const clues = (units: UnitSystem) => (telling ? cluesOfStart({ ...evidence, units }, record.startedAt) : []);
	const firstMover =
		record.outcome === 'tripped'
			? keepFirstMover(firstMoverOf(evidence.input, record, matchedHeld(record, evidence.starts)))
			: null;
	return { clues: { si: clues('si'), ip: clues('ip') }, firstMover };
}

async function compute(job: Job): Promise<{ computed: Computed[]; revision: number } | null> {
	return withOrganisation(job.organisationId, async (tx) => {
		const unit = await findUnit(tx, job.unitId);
		const site = unit && (await findSite(tx, unit.siteId));
		if (!unit || !site) return null;
		const facts = await factsOf(tx, unit.id);
		const typed = await listNoted(tx, unit.id);
		const computed: Computed[] = [];
		for (const input of await circuitInputs(tx, unit, site)) {
			const analysis = analyseCircuit(input);
			const evidence = { input, starts: analysis.starts, ...facts(input.circuit) };
			// The sentences carry figures, so they are kept in both systems of units.
			const suspects = {
				si: evaluateSuspects({ ...evidence, units: 'si' }),
				ip: evaluateSuspects({ ...evidence, units: 'ip' })
			};
			const unlogged = notedStarts({
				...input,
				typed: typed.flatMap(({ circuit, body }) => (circuit === input.circuit && body.kind === 'start' ? [body] : [])),
				covered: analysis.covered
			});
			computed.push({
				analysis,
				suspects,
				made: [
					...analysis.starts.map((record) => ({ record, extras: extrasOf(evidence, record) })),
					...unlogged.map((record) => ({ record, extras: NO_EXTRAS }))
				]
			});
		}
		return { computed, revision: unit.revision };
	});
}

async function store(
	job: Job,
	{ computed, revision }: { computed: Computed[]; revision: number },
	logIds: readonly string[]
): Promise<void> {
	await withOrganisation(job.organisationId, async (tx) => {
		await replaceStarts(
			tx,
			job.organisationId,
			job.unitId,
			computed.flatMap(({ made }) => made)
		);
		for (const { analysis, suspects } of computed) {
			await saveCircuitResult(tx, {
				organisationId: job.organisationId,
				unitId: job.unitId,
				circuit: analysis.circuit,
				revision,
				covered: analysis.covered.map(({ from, to }) => [from, to]),
				suspects,
				smallestEventSeconds: analysis.smallestEventSeconds,
				alarmShift: analysis.proposedAlarmShift,
				notes: analysis.notes,
				methodVersion: METHOD_VERSION
			});
		}
		for (const id of logIds) await updateLog(tx, id, { state: 'ready', progress: 1, readyAt: new Date() });
	});
}

/** Recomputes a unit. One at a time per unit; logs that wait for it are ready afterwards. */
export async function runAnalysis(job: Job): Promise<void> {
	await withLock(`unit ${job.unitId}`, true, async () => {
		const waiting = await withOrganisation(job.organisationId, async (tx) =>
			(await listLogs(tx, job.unitId)).filter((log) => log.state === 'analysing').map((log) => log.id)
		);
		const result = await compute(job);
		if (result) await store(job, result, waiting);
	});
}

/** Are other logs of the unit received or being read, after a first analysis has shown something? */
export async function moreLogsComing(organisationId: string, unitId: string): Promise<boolean> {
	return withOrganisation(organisationId, async (tx) => {
		const states = (await listLogStates(tx, [unitId])).map((log) => log.state);
		const shown = (await listCircuitResults(tx, [unitId])).length > 0;
		return shown && states.some((state) => state === 'received' || state === 'reading');
	});
}
