import { sampleColumn, type ColumnSample } from '../columns/sample';
import type { Draft } from '../layout/draft';
import { pointName } from '../read/long';
import { toUtf8 } from '../text/encoding';
import { readRows } from '../text/row-reader';
import { Dictionary, type RowView } from '../text/row-plan';
import { StampReader } from '../time/stamp';
import { TimeLine } from '../time/time-line';
import { ZoneClock } from '../time/zone';
import type { ReadContext } from '../types';

/** Readings kept of one point of a long layout: the first ones all, then ever fewer. */
const MOST_POINT = 500;
const HEAD_POINT = 80;
const MOST_POINTS = 3000;

/** Instants of a draft's sampled rows, NaN where a row has none. */
export function rowTimes(draft: Draft, ctx: ReadContext): number[] {
	const { time } = draft.plan;
	const reader = new StampReader(time.order, time.year);
	const line = new TimeLine(new ZoneClock(time.zone), ctx.now, time.descending);
	return draft.rows.map((row) => {
		const date = row.cells[time.column] ?? '';
		const text = time.clockColumn < 0 ? date : `${date} ${row.cells[time.clockColumn] ?? ''}`;
		return reader.readText(text) ? line.next(reader.out.wall, reader.out.offset) : NaN;
	});
}

/** The columns of a wide table, all sharing one array of times. */
export function wideSamples(draft: Draft, file: number, ctx: ReadContext): ColumnSample[] {
	const { plan, header } = draft;
	const times = rowTimes(draft, ctx);
	const good = draft.rows.map((row, i) => i).filter((i) => !Number.isNaN(times[i]));
	const headRows = good.filter((i) => i < draft.headRows).length;
	const t = good.map((i) => times[i] ?? NaN);
	return header.names.flatMap((column, index) => {
		if (index === plan.time.column || index === plan.time.clockColumn) return [];
		const cells = good.map((i) => draft.rows[i]?.cells[index] ?? '');
		const place = { file, index, column, unitCell: header.units[index] ?? '', headRows };
		return [sampleColumn(place, t, cells, plan.decimal)];
	});
}

type Point = { t: number[]; cells: string[]; unit: string; every: number; seen: number };

function keep(point: Point, t: number, cell: string): void {
	point.seen++;
	if (point.t.length >= HEAD_POINT && point.seen % point.every !== 0) return;
	point.t.push(t);
	point.cells.push(cell);
	if (point.t.length < MOST_POINT) return;
	const thin = <T>(list: T[]) => [
		...list.slice(0, HEAD_POINT),
		...list.slice(HEAD_POINT).filter((_, i) => i % 2 === 1)
	];
	point.t = thin(point.t);
	point.cells = thin(point.cells);
	point.every *= 2;
}

/** The points of a long table, found by passing over all of its rows: a point may first appear near the end. */
export async function longSamples(draft: Draft, file: number, ctx: ReadContext): Promise<ColumnSample[]> {
	const { plan } = draft;
	const { roles, time } = plan;
	const words = [...roles.names, roles.value, ...(roles.unit >= 0 ? [roles.unit] : [])];
	const dictionaries = words.map(() => new Dictionary());
	const rowPlan = {
		delimiter: plan.delimiter,
		decimal: plan.decimal,
		width: plan.width,
		time: { column: time.column, clockColumn: time.clockColumn, order: time.order, year: time.year },
		numbers: [roles.value],
		words
	};
	const points = new Map<string, Point>();
	const clock = new ZoneClock(time.zone);
	const word = (view: RowView, slot: number) => dictionaries[slot]?.list[view.words[slot] ?? -1] ?? '';
	const take = (view: RowView) => {
		const name = pointName(roles.names.map((_, i) => word(view, i)));
		let point = points.get(name);
		if (!point) {
			if (points.size >= MOST_POINTS) return;
			point = { t: [], cells: [], unit: roles.unit >= 0 ? word(view, roles.names.length + 1) : '', every: 1, seen: 0 };
			points.set(name, point);
		}
		const number = view.numbers[0] ?? NaN;
		const utc = Number.isNaN(view.offset) ? clock.instants(view.wall).first : view.wall - view.offset * 60_000;
		const text = Number.isNaN(number) ? word(view, roles.names.length) : String(number);
		keep(point, utc, plan.decimal === ',' && !Number.isNaN(number) ? text.replace('.', ',') : text);
	};
	const text = toUtf8(draft.leaf.open(), draft.look.form);
	for await (const _ of readRows(text, rowPlan, plan.dataLine, { row: take, odd: () => undefined }, dictionaries))
		void ctx;
	return [...points].map(([column, p]) =>
		sampleColumn(
			{ file, index: -1, column, unitCell: p.unit, headRows: Math.min(HEAD_POINT, p.t.length) },
			p.t,
			p.cells,
			plan.decimal
		)
	);
}
