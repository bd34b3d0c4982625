import type { Choice, DateOrder, ReadContext, TimePlan } from '../types';
import { StampReader } from './stamp';
import type { ColumnTime } from './time-form';
import { unrest } from './time-form';
import { abbreviationOffset } from './words';
import { isZone } from './zone';

const ORDER_WORDS: Readonly<Record<DateOrder, string>> = {
	ymd: 'year-month-day',
	dmy: 'day.month.year',
	mdy: 'month/day/year',
	md: 'month/day, no year',
	dm: 'day/month, no year',
	'epoch-s': 'seconds since 1970',
	'epoch-ms': 'milliseconds since 1970',
	serial: 'spreadsheet day numbers'
};

/** What the decision about time is made from. `cells` are stamps (date and clock joined) in the log's order. */
export type TimeEvidence = {
	column: number;
	clockColumn: number;
	time: ColumnTime;
	cells: string[];
	/** The time column's name and the title lines, where a zone may be named. */
	header: string;
	titles: string[];
};

function settleOrder(evidence: TimeEvidence, ctx: ReadContext): { order: DateOrder; sure: boolean } {
	const { orders } = evidence.time;
	const first = orders[0] ?? 'ymd';
	if (orders.length < 2) return { order: first, sure: true };
	const answered = ctx.answers?.['date-order'];
	const answer = orders.find((order) => order === answered);
	if (answer) return { order: answer, sure: true };
	// Points between the parts of a date are never used month first.
	if (/^\s*\d{1,2}\.\d{1,2}\.\d{2,4}/.test(evidence.cells[0] ?? '') && orders.includes('dmy'))
		return { order: 'dmy', sure: true };
	const rated = orders
		.map((order) => ({ order, unrest: unrest(evidence.cells, order, ctx.now) }))
		.sort((a, b) => a.unrest - b.unrest);
	const [best, next] = rated;
	if (best && next && best.unrest < next.unrest) return { order: best.order, sure: true };
	const american = /^America\/(?!Argentina|Sao|Bogota|Lima|Santiago|Mexico)/.test(ctx.timeZone);
	const likely: DateOrder = orders.includes('md') ? (american ? 'md' : 'dm') : american ? 'mdy' : 'dmy';
	return { order: orders.includes(likely) ? likely : first, sure: false };
}

function sampleOf(cell: string, order: DateOrder, year: number | null): string {
	const reader = new StampReader(order, year);
	if (!reader.readText(cell)) return cell;
	const text = new Date(reader.out.wall).toUTCString().slice(5, 22);
	return `${cell.trim()} is ${text}`;
}

/** The year that puts the last stamp before now. */
function settleYear(evidence: TimeEvidence, order: DateOrder, ctx: ReadContext): number {
	const answered = Number(ctx.answers?.year);
	if (Number.isInteger(answered) && answered >= 2000 && answered < 2200) return answered;
	const year = new Date(ctx.now).getUTCFullYear();
	const reader = new StampReader(order, year);
	let rolls = 0;
	let before = NaN;
	for (const cell of evidence.cells) {
		if (!reader.readText(cell)) continue;
		if (before - reader.out.wall > 250 * 86_400_000) rolls++;
		before = reader.out.wall;
	}
	return (before > ctx.now + 2 * 86_400_000 ? year - 1 : year) - Math.min(rolls, 5);
}

/** A zone named in the time column's header or in a title line. */
function namedZone(evidence: TimeEvidence): string | null {
	const iana = /\b([A-Z][a-z]+\/[A-Z][A-Za-z_]+(?:\/[A-Z][A-Za-z_]+)?)\b/;
	for (const title of evidence.titles) {
		const m = iana.exec(title);
		if (m?.[1] && isZone(m[1])) return m[1];
		const offset = /(?:zone|tz|utc offset)[^+\-\d]{0,12}((?:UTC|GMT)?\s*[+-]\d{1,2}(?::?\d{2})?)\b/i.exec(title);
		if (offset?.[1] && isZone(offset[1].replace(/\s/g, ''))) return offset[1].replace(/\s/g, '');
		if (/(zone|tz)[^a-z]{0,6}(utc|gmt)\b/i.test(title)) return 'UTC';
	}
	const header = iana.exec(evidence.header);
	if (header?.[1] && isZone(header[1])) return header[1];
	const offset = /((?:UTC|GMT)\s*[+-]\s*\d{1,2}(?::?\d{2})?)/i.exec(evidence.header);
	if (offset?.[1] && isZone(offset[1].replace(/\s/g, ''))) return offset[1].replace(/\s/g, '');
	if (/\b(utc|gmt|zulu)\b/i.test(evidence.header.replace(/_/g, ' '))) return 'UTC';
	const word = /[([ _]([A-Z]{3,4})[)\] ]*$/.exec(evidence.header)?.[1];
	const minutes = word ? abbreviationOffset(word) : NaN;
	if (Number.isNaN(minutes)) return null;
	const sign = minutes < 0 ? '-' : '+';
	const abs = Math.abs(minutes);
	return `${sign}${String(Math.floor(abs / 60)).padStart(2, '0')}:${String(abs % 60).padStart(2, '0')}`;
}

function isDescending(cells: readonly string[], order: DateOrder, year: number | null): boolean {
	const reader = new StampReader(order, year);
	let before = NaN;
	let up = 0;
	let down = 0;
	for (const cell of cells) {
		if (!reader.readText(cell)) continue;
		if (reader.out.wall > before) up++;
		else if (reader.out.wall < before) down++;
		before = reader.out.wall;
	}
	return down > up;
}

function zoneChoice(plan: TimePlan, named: string | null, ctx: ReadContext, cell: string): Choice {
	const zones = [...new Set([plan.zone, ctx.timeZone, 'UTC', ...(named ? [named] : [])])];
	const label = (zone: string) =>
		zone === ctx.timeZone ? `${zone}, the site's` : zone === named ? `${zone}, named in the file` : zone;
	return {
		key: 'zone',
		question: 'Which zone are the clocks of this log in?',
		chosen: plan.zone,
		options: zones.map((zone) => ({ value: zone, label: label(zone), sample: `${cell.trim()} ${zone}` })),
		sure: true
	};
}

/** How a file's stamps are read, with the choices a person may change. */
export function decideTime(evidence: TimeEvidence, ctx: ReadContext): { plan: TimePlan; choices: Choice[] } {
	const { order, sure } = settleOrder(evidence, ctx);
	const { time } = evidence;
	const year = time.hasYear ? null : settleYear(evidence, order, ctx);
	const named = namedZone(evidence);
	const epoch = order === 'epoch-s' || order === 'epoch-ms';
	const override = ctx.zoneOverride ?? ctx.answers?.zone;
	const zone = epoch ? 'UTC' : override && isZone(override) ? override : (named ?? ctx.timeZone);
	const plan: TimePlan = {
		column: evidence.column,
		clockColumn: evidence.clockColumn,
		order,
		year,
		zone,
		carriesZone: time.carriesZone || epoch,
		descending: isDescending(evidence.cells, order, year),
		form:
			(time.monthNames ? 'month names' : ORDER_WORDS[order]) +
			(time.twelveHour ? ', 12 hours' : '') +
			(evidence.clockColumn >= 0 ? ', date and clock apart' : '') +
			(time.carriesZone ? ', with zone' : '')
	};
	const cell = evidence.cells.find((c) => c.trim() !== '') ?? '';
	const choices: Choice[] = [];
	if (time.orders.length > 1) {
		choices.push({
			key: 'date-order',
			question: 'Is the day or the month written first?',
			chosen: order,
			options: time.orders.map((o) => ({ value: o, label: ORDER_WORDS[o], sample: sampleOf(cell, o, year) })),
			sure
		});
	}
	if (year !== null) {
		choices.push({
			key: 'year',
			question: 'The stamps carry no year. In which year does the log begin?',
			chosen: String(year),
			options: [year, year - 1, year + 1].map((y) => ({
				value: String(y),
				label: String(y),
				sample: sampleOf(cell, order, y)
			})),
			sure: ctx.answers?.year !== undefined
		});
	}
	if (!plan.carriesZone) choices.push(zoneChoice(plan, named, ctx, cell));
	return { plan, choices };
}
