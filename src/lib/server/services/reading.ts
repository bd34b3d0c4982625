import { airPressure } from '$lib/model/quantities';
import { now } from '$lib/server/config';
import {
	inspectLog,
	LogRefusal,
	readLog,
	type ColumnMapping,
	type Inspection,
	type ReadContext,
	type ReadResult,
	type SourceFile,
	type UnitRef
} from '$lib/server/ingest';
import {
	clearSamples,
	findLog,
	findRemembered,
	remember,
	updateLog,
	withLock,
	type LogChange,
	type LogRow
} from '$lib/server/repositories/logs';
import { findSite, findUnit, listUnits, raiseRevision, type UnitRow } from '$lib/server/repositories/plant';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { objectStore } from '$lib/server/store';
import { countConflicts } from './conflicts';
import type { KeptInspection } from './log-shapes';
import { StoringSink } from './storing-sink';

/** The job that turns a log's bytes into samples. Killed anywhere and begun again, it ends the same. */

type Job = { organisationId: string; logId: string };
const PROGRESS_EVERY_MS = 400;
/** Looking takes this share of the progress, reading the rest up to the analysis. */
const LOOK_SHARE = 0.08;
const READ_SHARE = 0.82;

const save = (job: Job, change: LogChange): Promise<void> =>
	withOrganisation(job.organisationId, (tx) => updateLog(tx, job.logId, change));

const unitRef = (unit: UnitRow): UnitRef => ({
	unitId: unit.id,
	tag: unit.tag,
	refrigerant: unit.refrigerant,
	circuits: unit.circuits,
	ratedAmps: unit.nature.ratedAmps ?? null
});

async function contextOf(job: Job, log: LogRow): Promise<{ context: ReadContext; siteId: string }> {
	return withOrganisation(job.organisationId, async (tx) => {
		const unit = await findUnit(tx, log.unitId);
		const site = unit && (await findSite(tx, unit.siteId));
		if (!unit || !site) throw new Error(`log ${log.id}: its unit is gone`);
		const siblings = (await listUnits(tx, site.id)).filter((other) => other.id !== unit.id);
		const remembered = await findRemembered(tx, site.id);
		const context: ReadContext = {
			unit: unitRef(unit),
			siblings: siblings.map(unitRef),
			timeZone: site.timeZone,
			zoneOverride: log.options.timeZone,
			airPressure: airPressure(site.altitude ?? 0),
			now: now().getTime(),
			remembered: remembered.flatMap((row) => rememberedHere(row, site.id)),
			ask: log.options.mapping === 'ask',
			answers: log.options.choices
		};
		return { context, siteId: site.id };
	});
}

/** What the format of an export decides, whichever site it comes from. */
const SHARED_CHOICES: ReadonlySet<string> = new Set(['decimal', 'date-order']);

type Remembered = ReadContext['remembered'][number];

/**
 * A remembered mapping as it counts at a site. What was confirmed elsewhere in the organisation is shared when it was
 * one unit's; the other site's clock, year and units of measure are not taken along.
 */
function rememberedHere(row: { siteId: string; signature: string; mapping: unknown }, siteId: string): Remembered[] {
	const { mapping, choices } = row.mapping as { mapping: ColumnMapping[]; choices: Record<string, string> };
	if (row.siteId === siteId) return [{ headerSignature: row.signature, mapping, choices }];
	const units = new Set(mapping.filter((entry) => entry.signal !== null).map((entry) => entry.unitId));
	if (units.size > 1) return [];
	const shared = Object.fromEntries(Object.entries(choices).filter(([key]) => SHARED_CHOICES.has(key)));
	return [{ headerSignature: row.signature, mapping, choices: shared, elsewhere: true }];
}

const sourcesOf = (log: LogRow): SourceFile[] =>
	log.files.map((file) => ({ name: file.name, size: file.bytes, open: () => objectStore().open(file.key) }));

const lines = (problems: Inspection['problems'], several: boolean) =>
	problems.map(({ file, line, column, kind, message }) => ({
		line,
		column,
		kind,
		message: several && file ? `${file}: ${message}` : message
	}));

async function refuse(
	job: Job,
	problems: Inspection['problems'],
	several: boolean,
	kept: KeptInspection | null
): Promise<void> {
	await withOrganisation(job.organisationId, async (tx) => {
		await clearSamples(tx, job.logId);
		await updateLog(tx, job.logId, {
			state: 'refused',
			problems: lines(problems, several),
			progress: 1,
			...(kept ? { inspection: kept, layout: kept.inspection.layout } : {})
		});
	});
}

/** Looks, and reads when nothing needs a person. Gives the units whose samples changed, or null when there is nothing to analyse. */
async function lookAndRead(job: Job, log: LogRow): Promise<string[] | null> {
	const several = log.files.length > 1;
	const { context, siteId } = await contextOf(job, log);
	const files = sourcesOf(log);
	await save(job, { state: 'reading', progress: 0 });
	const inspection = await inspectLog(files, context);
	const confirmed = log.mapping.length > 0 && log.mapping.every((entry) => entry.confirmed);
	const mapping = confirmed ? (log.mapping as ColumnMapping[]) : inspection.mapping;
	const kept: KeptInspection = { inspection, signals: [] };
	if (inspection.decision === 'refused') {
		await refuse(job, inspection.problems, several, kept);
		return null;
	}
	if (inspection.decision === 'needs-mapping' && !confirmed) {
		await save(job, {
			state: 'needs-mapping',
			progress: LOOK_SHARE,
			inspection: kept,
			layout: inspection.layout,
			mapping,
			problems: lines(inspection.problems, several)
		});
		return null;
	}
	await withOrganisation(job.organisationId, async (tx) => {
		await clearSamples(tx, job.logId);
		await updateLog(tx, job.logId, {
			inspection: kept,
			layout: inspection.layout,
			mapping,
			progress: LOOK_SHARE,
			rows: 0
		});
	});
	const sink = new StoringSink(job);
	let saved = 0;
	const result = await readLog(files, context, inspection, mapping, sink, async (progress) => {
		if (Date.now() - saved < PROGRESS_EVERY_MS) return;
		saved = Date.now();
		// Rows count as read once they are stored.
		await sink.flush();
		const share = progress.totalBytes > 0 ? progress.bytes / progress.totalBytes : 0;
		await save(job, { progress: LOOK_SHARE + READ_SHARE * Math.min(1, share), rows: progress.rows });
	});
	await sink.flush();
	if (!result.refused && result.rows === 0 && result.events === 0) {
		const why = 'No row of this log could be read; the first lines say why.';
		result.problems.unshift({ file: '', line: null, column: null, kind: 'no-rows', message: why });
		result.refused = true;
	}
	if (result.refused) {
		await refuse(job, result.problems, several, kept);
		return null;
	}
	await finish(job, log, result, { inspection, signals: result.signals }, [...sink.touched, log.unitId]);
	if (confirmed) await keepMapping(job, siteId, inspection.headerSignature, mapping, log);
	return [...new Set([...sink.touched, log.unitId])];
}

async function finish(
	job: Job,
	log: LogRow,
	result: ReadResult,
	kept: KeptInspection,
	touched: string[]
): Promise<void> {
	await withOrganisation(job.organisationId, async (tx) => {
		await updateLog(tx, job.logId, {
			state: 'analysing',
			progress: LOOK_SHARE + READ_SHARE,
			inspection: kept,
			rows: result.rows,
			samples: result.samples,
			firstAt: result.firstAt === null ? null : new Date(result.firstAt),
			lastAt: result.lastAt === null ? null : new Date(result.lastAt),
			quality: { ...result.quality, conflicts: 0 },
			problems: lines([...kept.inspection.problems, ...result.problems], log.files.length > 1)
		});
		if (result.firstAt !== null && result.lastAt !== null) {
			const window = { from: result.firstAt, to: result.lastAt };
			let conflicts = 0;
			for (const unitId of new Set(touched)) conflicts += await countConflicts(tx, unitId, job.logId, window);
			if (conflicts > 0) await updateLog(tx, job.logId, { quality: { ...result.quality, conflicts } });
		}
		for (const unitId of new Set(touched)) await raiseRevision(tx, unitId);
	});
}

async function keepMapping(
	job: Job,
	siteId: string,
	signature: string,
	mapping: ColumnMapping[],
	log: LogRow
): Promise<void> {
	await withOrganisation(job.organisationId, (tx) =>
		remember(tx, {
			organisationId: job.organisationId,
			siteId,
			signature,
			mapping: { mapping, choices: log.options.choices },
			confirmedBy: log.createdBy
		})
	);
}

/** What a refusal or a fault of ours says on the log. */
async function fail(job: Job, error: unknown): Promise<void> {
	if (error instanceof LogRefusal) {
		const problem = { file: error.file, line: error.line, column: null, kind: error.kind, message: error.message };
		await refuse(job, [problem], error.file !== '', null);
		return;
	}
	throw error;
}

/**
 * Reads one log and gives the units to analyse. Does nothing when another worker holds the log or it is done.
 * @throws what the store or the database throws: the queue tries again
 */
export async function runReading(job: Job): Promise<string[] | null> {
	return withLock(`log ${job.logId}`, false, async () => {
		const log = await withOrganisation(job.organisationId, (tx) => findLog(tx, job.logId));
		if (!log) return null;
		if (log.state === 'analysing') return [log.unitId, ...new Set(log.mapping.map((entry) => entry.unitId))];
		if (log.state !== 'received' && log.state !== 'reading') return null;
		try {
			return await lookAndRead(job, log);
		} catch (error) {
			await fail(job, error);
			return null;
		}
	});
}
