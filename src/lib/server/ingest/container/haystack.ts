import {
	HGrid,
	type HNum,
	type HDateTime,
	type HBool,
	type HStr,
	ZincReader,
	valueIsKind,
	Kind,
	type HVal
} from 'haystack-core';
import { LogRefusal } from '../types';

/** A JSON file is held in memory while it is read. */
const MOST_JSON = 96 * 1024 * 1024;

/** Names and units of a grid's columns, as a header's two rows. */
export type GridHead = { names: string[]; units: string[] };

/** Titles of a grid's columns: the display name, else the point's own, else the column's. */
export function gridHead(grid: HGrid): GridHead {
	const columns = grid.getColumns();
	const title = grid.meta.get<HStr>('dis')?.toString() ?? '';
	const names = columns.map((column) => {
		const id = column.meta.get('id');
		const dis = column.displayName !== column.name ? column.displayName : '';
		const point = valueIsKind(id, Kind.Ref) ? (id as { dis?: string }).dis : undefined;
		const alone = columns.length === 2 && column.name === 'val' && title !== '' ? title : '';
		return dis || point || alone || column.name;
	});
	return { names, units: columns.map((column) => column.meta.get<HStr>('unit')?.toString() ?? '') };
}

/** The head of a grid written in Zinc, from its two first lines; null when they are none. */
export function zincHead(firstLines: string): GridHead | null {
	const [version = '', columns = ''] = firstLines.split(/\r\n|\n|\r/);
	if (!/^ver:"\d/.test(version)) return null;
	try {
		const value = ZincReader.readValue(`${version}\n${columns}\n\n`);
		return valueIsKind<HGrid>(value, Kind.Grid) ? gridHead(value) : null;
	} catch {
		return null;
	}
}

function cellOf(value: HVal | null | undefined): string {
	if (value === null || value === undefined) return '';
	if (valueIsKind<HNum>(value, Kind.Number)) return String(value.value);
	if (valueIsKind<HDateTime>(value, Kind.DateTime)) return value.value;
	if (valueIsKind<HBool>(value, Kind.Bool)) return value.value ? 'true' : 'false';
	if (valueIsKind(value, Kind.NA)) return 'NA';
	return String(value);
}

/** A value of the older JSON form: `n:72.3 °F`, `t:2025-…`, `s:text`, `m:` and plain strings. */
function oldCell(value: unknown): string {
	if (typeof value === 'boolean' || typeof value === 'number') return String(value);
	if (typeof value !== 'string') return '';
	const m = /^([a-z-]):(.*)$/s.exec(value);
	if (!m) return value;
	if (m[1] === 'n') return (m[2] ?? '').split(' ')[0] ?? '';
	if (m[1] === 'z') return 'NA';
	return m[1] === 'm' || m[1] === '-' ? '' : (m[2] ?? '');
}

function tabbed(rows: readonly (readonly string[])[]): Uint8Array {
	const clean = (cell: string) => cell.replace(/[\t\r\n]+/g, ' ').replace(/^"/, '\u201d');
	return Buffer.from(rows.map((row) => row.map(clean).join('\t')).join('\n') + '\n', 'utf8');
}

function gridText(json: Record<string, unknown>): Uint8Array {
	const rows = Array.isArray(json.rows) ? (json.rows as Record<string, unknown>[]) : [];
	const old = rows.some((row) => Object.values(row).some((v) => typeof v === 'string' && /^[nt]:/.test(v)));
	if (old) {
		const columns = (json.cols ?? []) as { name: string; dis?: string; unit?: string }[];
		const strip = (s: string | undefined) => oldCell(s ?? '');
		return tabbed([
			columns.map((c) => strip(c.dis) || c.name),
			columns.map((c) => strip(c.unit)),
			...rows.map((row) => columns.map((c) => oldCell(row[c.name])))
		]);
	}
	const grid = HGrid.make({ _kind: Kind.Grid, ...json } as Parameters<typeof HGrid.make>[0]);
	const head = gridHead(grid);
	const names = grid.getColumnNames();
	return tabbed([head.names, head.units, ...grid.getRows().map((row) => names.map((name) => cellOf(row.get(name))))]);
}

/** Objects with the same keys, one a row. */
function listText(list: readonly Record<string, unknown>[]): Uint8Array {
	const keys = [...new Set(list.slice(0, 1000).flatMap((row) => Object.keys(row)))];
	const cell = (v: unknown) => (v === null || v === undefined || typeof v === 'object' ? '' : String(v));
	return tabbed([keys, ...list.map((row) => keys.map((key) => cell(row[key])))]);
}

function isRow(value: unknown): value is Record<string, unknown> {
	return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/**
 * A JSON file as tab-separated text: a Haystack grid (either JSON form), or a list of flat objects.
 * @throws LogRefusal when it is too large, no JSON, or JSON of another shape
 */
export async function haystackRows(stream: AsyncIterable<Uint8Array>, file: string): Promise<Uint8Array> {
	const parts: Uint8Array[] = [];
	let size = 0;
	for await (const chunk of stream) {
		parts.push(chunk);
		size += chunk.length;
		if (size > MOST_JSON)
			throw new LogRefusal('json-too-large', `${file} is too large for JSON; export it as CSV.`, file);
	}
	let json: unknown;
	try {
		json = JSON.parse(
			Buffer.concat(parts)
				.toString('utf8')
				.replace(/^\ufeff/, '')
		);
	} catch (error) {
		const reason = error instanceof Error ? error.message : 'damaged';
		throw new LogRefusal('json-damaged', `${file} looks like JSON but cannot be read: ${reason}.`, file);
	}
	try {
		if (isRow(json) && Array.isArray(json.cols)) return gridText(json);
		if (Array.isArray(json) && json.length > 0 && json.every(isRow)) return listText(json);
	} catch (error) {
		const reason = error instanceof Error ? error.message : 'damaged';
		throw new LogRefusal('json-damaged', `${file} is a grid that cannot be read: ${reason}.`, file);
	}
	throw new LogRefusal('json-shape', `${file} is JSON, but neither a Haystack grid nor a list of rows.`, file);
}
