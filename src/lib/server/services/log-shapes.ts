import type { Inspection, SignalQuality } from '$lib/server/ingest';
import type { Log, LogPreview } from '$lib/model/wire/log';
import type { LogRow } from '$lib/server/repositories/logs';

/** What is kept of a look at a log, beside the log's own columns. */
export type KeptInspection = { inspection: Inspection; signals: SignalQuality[] };

const NO_QUALITY: Log['quality'] = {
	gaps: 0,
	longestGapSeconds: 0,
	repeats: 0,
	outOfOrder: 0,
	badValues: {},
	coverage: 0,
	conflicts: 0
};

/** A log as the API gives it. */
export function logShape(row: LogRow): Log {
	return {
		id: row.id,
		unitId: row.unitId,
		name: row.name,
		bytes: row.bytes,
		sha256: row.sha256,
		files: row.files.map(({ name, bytes, sha256 }) => ({ name, bytes, sha256 })),
		state: row.state,
		progress: row.progress,
		layout: row.layout,
		mapping: row.mapping,
		rows: row.rows,
		samples: row.samples,
		firstAt: row.firstAt?.toISOString() ?? null,
		lastAt: row.lastAt?.toISOString() ?? null,
		quality: { ...NO_QUALITY, ...row.quality },
		problems: row.problems,
		createdAt: row.createdAt.toISOString()
	};
}

/** What the mapping page shows, from what was kept of the look. */
export function previewShape(row: LogRow): LogPreview & { questions: string[]; signals: SignalQuality[] } {
	const kept = row.inspection as KeptInspection | null;
	if (!kept) return { columns: [], lines: [], choices: [], questions: [], signals: [] };
	const { columns, lines, choices, questions } = kept.inspection;
	const current = new Map(row.mapping.map((entry) => [`${entry.file}\n${entry.column}`, entry]));
	return {
		columns: columns.map((column) => ({
			...column,
			guess: current.get(`${column.file}\n${column.column}`) ?? column.guess
		})),
		lines,
		choices,
		questions,
		signals: kept.signals
	};
}
