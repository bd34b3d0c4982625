import { notFound } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import type { ProofAnswer, Repeaters } from '$lib/model/wire/proof';
import { prove, repeaters, type Proof, type Repeater } from '$lib/server/analysis/proof';
import { now } from '$lib/server/config';
import { findCase, listChanges, type ChangeRow } from '$lib/server/repositories/circle';
import { listSites, listUnits } from '$lib/server/repositories/plant';
import { listCircuitResults, listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { maySeeSite } from '$lib/model/people';
import { siteShape } from './plant-shapes';
import { factsOf } from './facts';
import { iso, unitsObject } from './start-shapes';
import { visibleUnit } from './units';

const changeLink = (row: ChangeRow) => ({ id: row.id, at: row.at.toISOString(), text: row.text });

const NO_CHANGE = {
	change: null,
	state: 'no-change',
	before: { k: 0, m: 0, d: 1, countedK: 0, countedM: 0, openingTrip: null },
	after: { t: 0, c: 0, days: 0 },
	e: null,
	threshold: 40,
	cleanStillNeeded: null,
	withinSeason: null,
	excluded: [],
	leftOut: [],
	otherChanges: [],
	sentences: ['No change is recorded on this unit. Record what was changed, and the starts after it are counted here.']
} as const;

/** Which change of its case this is (1, 2, …), and when the case was opened. */
async function placeInCase(
	tx: Tx,
	change: ChangeRow,
	changes: readonly ChangeRow[]
): Promise<{ changeNumber: number; caseOpenedAt: number | null }> {
	if (!change.caseId) return { changeNumber: 1, caseOpenedAt: null };
	const ofCase = changes.filter((row) => row.caseId === change.caseId);
	const opened = await findCase(tx, change.caseId);
	return { changeNumber: ofCase.indexOf(change) + 1, caseOpenedAt: opened?.openedAt.getTime() ?? null };
}

function answerOf(
	proof: Proof,
	rows: readonly StartRow[],
	change: ChangeRow
): Omit<ProofAnswer, 'circuit' | 'changes' | 'units'> {
	const ids = new Map(rows.map((row) => [row.startedAt, row.id]));
	return {
		...proof,
		change: changeLink(change),
		before: { ...proof.before, openingTrip: proof.before.openingTrip === null ? null : iso(proof.before.openingTrip) },
		excluded: proof.excluded.map(({ start, reason }) => ({
			startId: ids.get(start.startedAt) ?? null,
			startedAt: iso(start.startedAt),
			reason
		})),
		otherChanges: proof.otherChanges.map(({ id, at, text }) => ({ id, at: iso(at), text }))
	};
}

/** The proof since a change. @throws AppError `not-found` for a change that is none of this unit */
export async function proofOf(
	actor: Actor,
	unitId: string,
	query: { change?: string | undefined; circuit?: string | undefined },
	system: UnitSystem
): Promise<ProofAnswer> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { site } = await visibleUnit(tx, actor, unitId);
		const changes = await listChanges(tx, unitId);
		const change = query.change ? changes.find((row) => row.id === query.change) : changes.at(-1);
		if (query.change && !change) throw notFound('change');
		const circuit = query.circuit ?? change?.circuit ?? '1';
		const rest = { circuit, changes: changes.map(changeLink), units: unitsObject(system) };
		if (!change)
			return {
				...NO_CHANGE,
				excluded: [],
				leftOut: [],
				otherChanges: [],
				sentences: [...NO_CHANGE.sentences],
				...rest
			};
		const rows = await listStarts(tx, [unitId], { circuit });
		const facts = (await factsOf(tx, unitId))(circuit).changes;
		const fact = facts.find(({ id }) => id === change.id);
		if (!fact) throw notFound('change');
		const proof = prove({
			starts: rows.map((row) => row.record),
			change: fact,
			...(await placeInCase(tx, change, changes)),
			otherChanges: facts,
			timeZone: site.timeZone,
			until: now().getTime(),
			units: system
		});
		return { ...answerOf(proof, rows, change), ...rest };
	});
}

const clockOf = (minutes: number): string =>
	`${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(Math.floor(minutes % 60)).padStart(2, '0')}`;
const beThere = (at: Repeater['beThereBy']['weekend']) => at && { ...at, clock: clockOf(at.minutes) };

/** The manager's list over the units a person may see. */
export async function repeatersOf(
	actor: Actor,
	query: { site?: string | undefined; from?: string | undefined; to?: string | undefined }
): Promise<Repeaters> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const sites = new Map((await listSites(tx)).map((site) => [site.id, site]));
		const units = (await listUnits(tx, query.site)).filter((unit) => maySeeSite(actor, unit.siteId));
		const ids = units.map((unit) => unit.id);
		const rows = await listStarts(tx, ids, {
			...(query.from ? { from: Date.parse(query.from) } : {}),
			...(query.to ? { to: Date.parse(query.to) } : {})
		});
		const results = await listCircuitResults(tx, ids);
		const inputs = [];
		for (const result of results) {
			const unit = units.find(({ id }) => id === result.unitId);
			const site = unit && sites.get(unit.siteId);
			if (!site) continue;
			const changes = (await listChanges(tx, result.unitId)).filter(
				({ circuit }) => circuit === null || circuit === result.circuit
			);
			inputs.push({
				unit: `${result.unitId} ${result.circuit}`,
				timeZone: site.timeZone,
				starts: rows
					.filter((row) => row.unitId === result.unitId && row.circuit === result.circuit)
					.map((row) => row.record),
				lastChangeAt: changes.at(-1)?.at.getTime() ?? null,
				covered: result.covered.map(([from, to]) => ({ from, to }))
			});
		}
		return {
			repeaters: repeaters(inputs, now().getTime()).flatMap(({ unit: key, chance, beThereBy, ...rest }) => {
				const [unitId = '', circuit = '1'] = key.split(' ');
				const unit = units.find(({ id }) => id === unitId);
				const site = unit && sites.get(unit.siteId);
				if (!site) return [];
				const times = { 'working-day': beThere(beThereBy['working-day']), weekend: beThere(beThereBy.weekend) };
				return [{ unitId, tag: unit.tag, circuit, site: siteShape(site), ...chance, ...rest, beThereBy: times }];
			})
		};
	});
}
