import { AppError, notFound } from '$lib/model/errors';
import { may, maySeeSite, type Actor } from '$lib/model/people';
import type { PlanRow, Visit, VisitInput, VisitPatch } from '$lib/model/wire/visit';
import { beThereBy, weekdayKind } from '$lib/server/analysis/proof';
import { demand } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { enqueueAnalysis } from '$lib/server/jobs/queue';
import { recordAudit } from '$lib/server/repositories/audit';
import {
	deleteVisit,
	findVisit,
	insertVisit,
	listCases,
	listVisits,
	updateCase,
	updateVisit,
	type CaseRow,
	type VisitRow
} from '$lib/server/repositories/circle';
import { listSites, listUnits, type SiteRow } from '$lib/server/repositories/plant';
import { listStarts } from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import { DateTime } from 'luxon';
import { caseNumber } from './case-shapes';
import { noteOnCase } from './case-timeline';
import { memberFits } from './cases';
import { memberNames } from './checks';
import { countFirstTries, trippedInARow } from './first-tries';
import { shortDate } from './site-clock';
import { visibleUnit } from './units';
import { visitShape, type VisitAround } from './visit-shapes';

/** Planned trips to a unit, and what came of them. */

export type VisitFilter = {
	unit?: string | undefined;
	from?: string | undefined;
	to?: string | undefined;
	open?: boolean;
};

/** The visits a person may see, by date. */
export async function visitsOf(actor: Actor, filter: VisitFilter): Promise<Visit[]> {
	const names = await memberNames(actor.organisationId);
	return withOrganisation(actor.organisationId, async (tx) => {
		const sites = new Map((await listSites(tx)).map((site) => [site.id, site]));
		const units = (await listUnits(tx)).filter(
			(unit) => maySeeSite(actor, unit.siteId) && (!filter.unit || unit.id === filter.unit)
		);
		const ids = units.map((unit) => unit.id);
		const cases = await listCases(tx, ids);
		return (await listVisits(tx, ids))
			.filter((row) => (!filter.from || row.date >= filter.from) && (!filter.to || row.date <= filter.to))
			.filter((row) => !filter.open || row.leftAt === null)
			.flatMap((row) => {
				const unit = units.find(({ id }) => id === row.unitId);
				const site = unit && sites.get(unit.siteId);
				return site ? [visitShape(row, { unit, site, cases, names })] : [];
			});
	});
}

/** A visit this person may know of, with what stands around it. @throws AppError `not-found` */
export async function visibleVisit(
	tx: Tx,
	actor: Actor,
	id: string
): Promise<{ row: VisitRow; around: Omit<VisitAround, 'names'> }> {
	const row = await findVisit(tx, id);
	if (!row) throw notFound('visit');
	const { unit, site } = await visibleUnit(tx, actor, row.unitId).catch(() => {
		throw notFound('visit');
	});
	return { row, around: { unit, site, cases: await listCases(tx, [unit.id]) } };
}

/** One visit. */
export async function visitOf(actor: Actor, id: string): Promise<Visit> {
	const names = await memberNames(actor.organisationId);
	return withOrganisation(actor.organisationId, async (tx) => {
		const { row, around } = await visibleVisit(tx, actor, id);
		return visitShape(row, { ...around, names });
	});
}

const clockWords = (minutes: number): string =>
	`${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`;

/** The clock to be there by on a date, from the usual first starts of that kind of day; null when too few are known. */
export async function usualBeThereBy(
	tx: Tx,
	unitId: string,
	site: SiteRow,
	date: string
): Promise<{ clock: string; firstStarts: number } | null> {
	const records = (await listStarts(tx, [unitId])).map((row) => row.record);
	const weekday = DateTime.fromISO(date, { zone: site.timeZone }).weekday % 7;
	const found = beThereBy(records, site.timeZone, now().getTime())[weekdayKind(weekday)];
	return found ? { clock: clockWords(found.minutes), firstStarts: found.firstStarts } : null;
}

function caseFits(cases: readonly CaseRow[], caseId: string | null | undefined): void {
	if (!caseId || cases.some((row) => row.id === caseId)) return;
	throw new AppError('invalid', 'This case is not of this unit.', {
		errors: [{ field: 'caseId', message: 'of another unit' }]
	});
}

async function noteVisit(tx: Tx, actor: Actor, row: VisitRow, text: string): Promise<void> {
	if (row.caseId) await noteOnCase(tx, actor, row.caseId, { kind: 'visit', text, link: `/visits/${row.id}` });
}

/** Plans a visit; without a clock, from the unit's usual first start; without a case, for its open one. */
export async function planVisit(actor: Actor, input: VisitInput): Promise<Visit> {
	demand(actor, 'field');
	if (!may(actor, 'plan') && input.technicianId !== actor.personId)
		throw new AppError('forbidden', 'A technician may plan a visit for themselves only.');
	const id = await withOrganisation(actor.organisationId, async (tx) => {
		const { site } = await visibleUnit(tx, actor, input.unitId);
		await memberFits(actor, input.technicianId, site.id, 'technicianId');
		const cases = await listCases(tx, [input.unitId]);
		caseFits(cases, input.caseId);
		const owner = input.caseId
			? cases.find((row) => row.id === input.caseId)
			: cases.find((row) => row.state !== 'closed');
		const usual = input.beThereBy === undefined ? await usualBeThereBy(tx, input.unitId, site, input.date) : null;
		const row = await insertVisit(tx, {
			organisationId: actor.organisationId,
			unitId: input.unitId,
			caseId: owner?.id ?? null,
			date: input.date,
			beThereBy: input.beThereBy ?? usual?.clock ?? null,
			technicianId: input.technicianId,
			purpose: input.purpose || null,
			accessNotes: input.accessNotes || null,
			createdBy: actor.personId
		});
		await noteVisit(
			tx,
			actor,
			row,
			`Visit planned for ${shortDate(row.date)}${row.beThereBy ? `, there by ${row.beThereBy}` : ''}.`
		);
		if (owner && (owner.state === 'open' || owner.state === 'reopened'))
			await updateCase(tx, owner.id, { state: 'visit planned' });
		await recordAudit(tx, actor, { action: 'planned', subject: 'visit', subjectId: row.id, after: input });
		return row.id;
	});
	return visitOf(actor, id);
}

const PLANNING = ['date', 'technicianId', 'caseId'] as const;

function timesFit(row: VisitRow, patch: VisitPatch): { arrivedAt: Date | null; leftAt: Date | null } {
	const instant = (given: string | null | undefined, kept: Date | null): Date | null =>
		given === undefined ? kept : given === null ? null : new Date(given);
	const arrivedAt = instant(patch.arrivedAt, row.arrivedAt);
	const leftAt = instant(patch.leftAt, row.leftAt);
	if (leftAt && (!arrivedAt || leftAt < arrivedAt))
		throw new AppError('invalid', 'The leaving is before the arrival.', {
			errors: [{ field: 'leftAt', message: 'before the arrival' }]
		});
	return { arrivedAt, leftAt };
}

/** Changes a visit: its plan, the times on site, its result. Times on site make the starts of that stretch attended. */
export async function changeVisit(actor: Actor, id: string, patch: VisitPatch): Promise<Visit> {
	demand(actor, 'field');
	const moved = await withOrganisation(actor.organisationId, async (tx) => {
		const { row, around } = await visibleVisit(tx, actor, id);
		if (PLANNING.some((field) => patch[field] !== undefined) && row.technicianId !== actor.personId)
			demand(actor, 'plan');
		await memberFits(actor, patch.technicianId, around.site.id, 'technicianId');
		caseFits(around.cases, patch.caseId);
		const times = timesFit(row, patch);
		const fields = Object.fromEntries(Object.entries(patch).filter(([, value]) => value !== undefined));
		const change = { ...fields, ...times };
		await updateVisit(tx, id, change);
		const after = { ...row, ...change } as VisitRow;
		if (times.arrivedAt && !row.arrivedAt) await noteVisit(tx, actor, after, 'Arrived at the unit.');
		if (patch.result && patch.result !== row.result) await noteVisit(tx, actor, after, `Result: ${patch.result}`);
		if (patch.date && patch.date !== row.date)
			await noteVisit(tx, actor, after, `Visit moved to ${shortDate(patch.date)}.`);
		await recordAudit(tx, actor, { action: 'changed', subject: 'visit', subjectId: id, before: row, after: patch });
		const same = (a: Date | null, b: Date | null): boolean => a?.getTime() === b?.getTime();
		return same(times.arrivedAt, row.arrivedAt) && same(times.leftAt, row.leftAt) ? null : row.unitId;
	});
	if (moved) await enqueueAnalysis({ organisationId: actor.organisationId, unitId: moved });
	return visitOf(actor, id);
}

/** Takes back a visit that did not begin. @throws AppError `conflict` when it did */
export async function cancelVisit(actor: Actor, id: string): Promise<void> {
	demand(actor, 'plan');
	await withOrganisation(actor.organisationId, async (tx) => {
		const { row } = await visibleVisit(tx, actor, id);
		if (row.arrivedAt) throw new AppError('conflict', 'This visit has begun; it stays on record.');
		await deleteVisit(tx, id);
		await noteVisit(tx, actor, row, `Visit of ${shortDate(row.date)} taken back.`);
		await recordAudit(tx, actor, { action: 'removed', subject: 'visit', subjectId: id, before: row });
	});
}

/** The units worth a visit, worst repeater first, with the clock to be there by and what is planned already. */
export async function weekPlan(actor: Actor, from: string, to: string): Promise<PlanRow[]> {
	demand(actor, 'readSuspects');
	const names = await memberNames(actor.organisationId);
	return withOrganisation(actor.organisationId, async (tx) => {
		const sites = new Map((await listSites(tx)).map((site) => [site.id, site]));
		const units = (await listUnits(tx)).filter((unit) => maySeeSite(actor, unit.siteId));
		const ids = units.map((unit) => unit.id);
		const starts = await listStarts(tx, ids);
		const cases = (await listCases(tx, ids)).filter((row) => row.state !== 'closed');
		const visits = (await listVisits(tx, ids)).filter((row) => row.date >= from && row.date <= to);
		const rows = units.flatMap((unit) => {
			const site = sites.get(unit.siteId);
			if (!site) return [];
			const records = starts.filter((row) => row.unitId === unit.id).map((row) => row.record);
			const { k, m } = countFirstTries(records);
			const there = beThereBy(records, site.timeZone, now().getTime());
			const owner = cases.find((row) => row.unitId === unit.id);
			const clock = (kind: keyof typeof there): string | null => {
				const found = there[kind];
				return found ? clockWords(found.minutes) : null;
			};
			return [
				{
					unitId: unit.id,
					unitTag: unit.tag,
					siteName: site.name,
					caseId: owner?.id ?? null,
					caseNumber: owner ? caseNumber(owner) : null,
					k,
					m,
					trippedInARow: trippedInARow(records),
					beThereBy: { workingDay: clock('working-day'), weekend: clock('weekend') },
					visits: visits
						.filter((row) => row.unitId === unit.id)
						.map((row) => ({
							id: row.id,
							date: row.date,
							beThereBy: row.beThereBy,
							who: row.technicianId ? (names.get(row.technicianId) ?? null) : null
						}))
				}
			];
		});
		const wanted = rows.filter((row) => row.k > 0 || row.caseId !== null || row.visits.length > 0);
		return wanted.sort((a, b) => b.trippedInARow - a.trippedInARow || b.k - a.k || (a.unitTag < b.unitTag ? -1 : 1));
	});
}
