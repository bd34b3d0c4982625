import { AppError } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import { apiMeasure, fromStored, MEASURES, type MeasureKey, type UnitSystem } from '$lib/model/quantities';
import type { Series } from '$lib/model/series';
import { isSignalKey, SIGNALS, signalOf, type SeriesId } from '$lib/model/signals';
import { firstAtOrAfter } from '$lib/server/analysis/series/search';
import { listSignals } from '$lib/server/repositories/blocks';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { csvRow } from '$lib/utils/csv';
import ExcelJS from 'exceljs';
import { PassThrough, Readable } from 'node:stream';
import { loadSeries } from './series';
import { visibleUnit } from './units';

/** A window of a unit's samples as a file, made day by day so that memory does not grow with the window. */

export type ExportQuery = {
	from: string;
	to: string;
	circuit: string;
	signals?: string | undefined;
	format: 'csv' | 'xlsx' | 'zinc';
};

const DAY = 86_400_000;
const MOST_SHEET_ROWS = 1_048_575;

type Column = { id: SeriesId; label: string; measure: MeasureKey };
type Row = { at: number; values: (number | null)[] };

async function columnsOf(
	actor: Actor,
	unitId: string,
	query: ExportQuery,
	system: UnitSystem
): Promise<{ columns: Column[]; name: string }> {
	const wanted = query.signals?.split(',').map((key) => key.trim());
	const wrong = wanted?.find((key) => !isSignalKey(key));
	if (wrong) throw new AppError('invalid', `“${wrong}” is no signal.`);
	return withOrganisation(actor.organisationId, async (tx) => {
		const { unit, site } = await visibleUnit(tx, actor, unitId);
		const found = await listSignals(tx, unitId);
		const ids = new Set(
			found
				.filter((row) => row.circuit === query.circuit || SIGNALS[signalOf(row.signal)].scope === 'unit')
				.map((row) => row.signal)
		);
		const columns = [...ids]
			.filter((id) => !wanted || wanted.includes(signalOf(id)))
			.sort()
			.map((id) => {
				const { label, quantity } = SIGNALS[signalOf(id)];
				return {
					id,
					label: id === signalOf(id) ? label : `${label} ${id.at(-1)}`,
					measure: apiMeasure(quantity, system)
				};
			});
		return { columns, name: `${site.name} ${unit.tag} circuit ${query.circuit}` };
	});
}

/** Rows at every instant of any column, day by day; a column without a reading at that very instant is blank. */
async function* rowsOf(
	actor: Actor,
	unitId: string,
	query: ExportQuery,
	columns: readonly Column[]
): AsyncGenerator<Row> {
	const end = Date.parse(query.to);
	for (let from = Date.parse(query.from); from < end; from += DAY) {
		const to = Math.min(from + DAY, end) - 1;
		const map = await withOrganisation(actor.organisationId, async (tx) => {
			const maps = await loadSeries(tx, unitId, [query.circuit], {
				window: { from, to },
				signals: columns.map(({ id }) => id)
			});
			return maps.get(query.circuit) ?? {};
		});
		const series = columns.map(({ id }) => map[id]);
		yield* dayRows(series, columns, from, to);
	}
}

function* dayRows(
	series: readonly (Series | undefined)[],
	columns: readonly Column[],
	from: number,
	to: number
): Generator<Row> {
	const places = series.map((one) => (one ? firstAtOrAfter(one.t, from) : 0));
	for (;;) {
		let at = Infinity;
		series.forEach((one, i) => {
			const next = one?.t[places[i] ?? 0] ?? Infinity;
			if (next < at) at = next;
		});
		if (at > to) return;
		const values = series.map((one, i) => {
			const place = places[i] ?? 0;
			if (one?.t[place] !== at) return null;
			places[i] = place + 1;
			const stored = one.v[place] ?? NaN;
			const measure = one.measure === 'pctRated' ? 'pctRated' : (columns[i]?.measure ?? 'count');
			return Number.isNaN(stored) ? null : Number(fromStored(stored, measure).toPrecision(9));
		});
		yield { at, values };
	}
}

const stamp = (at: number): string => new Date(at).toISOString();
const heading = (column: Column): string =>
	`${column.label}${MEASURES[column.measure].symbol ? ` (${MEASURES[column.measure].symbol})` : ''}`;

async function* csvOf(rows: AsyncGenerator<Row>, columns: readonly Column[]): AsyncGenerator<string> {
	yield csvRow(['time', ...columns.map(heading)]);
	let chunk = '';
	for await (const { at, values } of rows) {
		chunk += csvRow([stamp(at), ...values]);
		if (chunk.length > 60_000) {
			yield chunk;
			chunk = '';
		}
	}
	yield chunk;
}

const ZINC_UNITS: Readonly<Partial<Record<MeasureKey, string>>> = {
	degC: '°C',
	degF: '°F',
	K: 'Δ°C',
	degFdiff: 'Δ°F',
	kPa: 'kPa',
	psia: 'psi',
	kPad: 'kPa',
	psid: 'psi',
	lps: 'L/s',
	gpm: 'gal/min',
	kW: 'kW',
	pct: '%',
	Hz: 'Hz',
	A: 'A',
	V: 'V',
	h: 'h'
};

/** Project Haystack's Zinc grid, version 3.0. */
async function* zincOf(rows: AsyncGenerator<Row>, columns: readonly Column[], name: string): AsyncGenerator<string> {
	const text = (value: string): string =>
		`"${value.replaceAll('\\', '\\\\').replaceAll('"', '\\"').replaceAll('$', '\\$')}"`;
	yield `ver:"3.0" dis:${text(name)}\n`;
	yield `${['ts', ...columns.map(({ id, label }) => `${id.replace('.', '')} dis:${text(label)}`)].join(',')}\n`;
	for await (const { at, values } of rows) {
		const cells = values.map((value, i) =>
			value === null ? '' : `${value}${ZINC_UNITS[columns[i]?.measure ?? 'count'] ?? ''}`
		);
		yield `${[`${stamp(at)} UTC`, ...cells].join(',')}\n`;
	}
}

function sheetOf(rows: AsyncGenerator<Row>, columns: readonly Column[]): Readable {
	const out = new PassThrough();
	const write = async (): Promise<void> => {
		const book = new ExcelJS.stream.xlsx.WorkbookWriter({ stream: out, useStyles: false });
		const sheet = book.addWorksheet('samples');
		sheet.addRow(['time (UTC)', ...columns.map(heading)]).commit();
		let count = 0;
		for await (const { at, values } of rows) {
			if (++count > MOST_SHEET_ROWS)
				throw new AppError('too-large', 'A sheet has 1,048,576 rows at most: choose a shorter window.');
			sheet.addRow([new Date(at), ...values]).commit();
		}
		await book.commit();
	};
	write().catch((error: Error) => out.destroy(error));
	return out;
}

const TYPES = {
	csv: 'text/csv; charset=utf-8',
	xlsx: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
	zinc: 'text/zinc; charset=utf-8'
} as const;

/** A window of samples as a stream, with its name and type. @throws AppError `invalid` when the window or a signal is none */
export async function exportSamples(
	actor: Actor,
	unitId: string,
	query: ExportQuery,
	system: UnitSystem
): Promise<{ body: ReadableStream<Uint8Array>; name: string; type: string }> {
	if (!(Date.parse(query.from) < Date.parse(query.to))) throw new AppError('invalid', '“from” must be before “to”.');
	const { columns, name } = await columnsOf(actor, unitId, query, system);
	const rows = rowsOf(actor, unitId, query, columns);
	const source =
		query.format === 'xlsx'
			? sheetOf(rows, columns)
			: Readable.from(query.format === 'csv' ? csvOf(rows, columns) : zincOf(rows, columns, name));
	const bytes = query.format === 'xlsx' ? source : source.map((text: string) => Buffer.from(text));
	return {
		body: Readable.toWeb(bytes) as ReadableStream<Uint8Array>,
		name: `${name} ${query.from.slice(0, 10)}.${query.format}`,
		type: TYPES[query.format]
	};
}
