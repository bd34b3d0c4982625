import { AppError, notFound } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import type { TripWord, TripWordInput, TripWords } from '$lib/model/wire/trip-word';
import { plainWords } from '$lib/server/analysis/outcomes/words';
import { demand } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { enqueueAnalysis } from '$lib/server/jobs/queue';
import { recordAudit } from '$lib/server/repositories/audit';
import { listUnits, raiseRevision } from '$lib/server/repositories/plant';
import { listStarts } from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import {
	deleteTripWord,
	findTripWord,
	insertTripWord,
	listTripWords,
	type TripWordRow
} from '$lib/server/repositories/trip-words';
import { visibleUnit } from './units';

/** The trip-word table as a person extends it: words of their controllers, before the trade's own. */

const shape = (row: TripWordRow): TripWord => ({
	id: row.id,
	words: row.words,
	kind: row.kind,
	unitId: row.unitId,
	by: row.byName,
	createdAt: row.createdAt.toISOString()
});

/** The words in force for a unit, and the texts of its recorded trips that none names. */
export async function tripWordsOf(actor: Actor, unitId: string): Promise<TripWords> {
	return withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		const times = new Map<string, number>();
		for (const { record } of await listStarts(tx, [unitId], { source: 'all' })) {
			const text = record.trip?.kind === 'unknown' ? record.trip.text : null;
			if (text) times.set(text, (times.get(text) ?? 0) + 1);
		}
		const unnamed = [...times].map(([text, count]) => ({ text, times: count })).sort((a, b) => b.times - a.times);
		return { words: (await listTripWords(tx, unitId)).map(shape), unnamed: unnamed.slice(0, 50) };
	});
}

/** The units whose trips a word may name anew. */
async function unitsOfWord(tx: Tx, unitId: string | null): Promise<string[]> {
	const ids = unitId === null ? (await listUnits(tx)).map((unit) => unit.id) : [unitId];
	for (const id of ids) await raiseRevision(tx, id);
	return ids;
}

async function recompute(actor: Actor, unitIds: readonly string[]): Promise<void> {
	for (const unitId of unitIds) await enqueueAnalysis({ organisationId: actor.organisationId, unitId });
}

/**
 * Adds a word; the trips it names are told anew.
 * @throws AppError `conflict` when the same words stand there already
 */
export async function addTripWord(actor: Actor, unitId: string, input: TripWordInput): Promise<TripWord> {
	demand(actor, 'plant');
	const { added, touched } = await withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		if (input.unitId !== null && input.unitId !== unitId)
			throw new AppError('invalid', 'A word is for this unit or for every unit.');
		if (plainWords(input.words) === '') throw new AppError('invalid', 'The words hold no letter and no figure.');
		const same = (await listTripWords(tx, unitId)).find(
			(row) => row.unitId === input.unitId && plainWords(row.words) === plainWords(input.words)
		);
		if (same) throw new AppError('conflict', `“${same.words}” is there already.`);
		const row = await insertTripWord(tx, {
			organisationId: actor.organisationId,
			unitId: input.unitId,
			words: input.words,
			kind: input.kind,
			byName: actor.name,
			createdAt: now()
		});
		await recordAudit(tx, actor, { action: 'added', subject: 'trip word', subjectId: row.id, after: input });
		return { added: shape(row), touched: await unitsOfWord(tx, input.unitId) };
	});
	await recompute(actor, touched);
	return added;
}

/** Takes a word away. @throws AppError `not-found` */
export async function removeTripWord(actor: Actor, unitId: string, id: string): Promise<void> {
	demand(actor, 'plant');
	const touched = await withOrganisation(actor.organisationId, async (tx) => {
		await visibleUnit(tx, actor, unitId);
		const row = await findTripWord(tx, id);
		if (!row || (row.unitId !== null && row.unitId !== unitId)) throw notFound('word');
		await deleteTripWord(tx, id);
		await recordAudit(tx, actor, { action: 'removed', subject: 'trip word', subjectId: id, before: shape(row) });
		return unitsOfWord(tx, row.unitId);
	});
	await recompute(actor, touched);
}
