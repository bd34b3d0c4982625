import type { Brief } from '$lib/model/wire/visit';
import {
	daysPicture,
	startPicture,
	type DaysPicture,
	type PlacedText,
	type StartPicture
} from '$lib/utils/brief-pictures';
import { formatPrintedAt } from '$lib/utils/clock';
import { now } from '$lib/server/config';
import { shortDate } from '../site-clock';
import { DASHES, INKS, Paper, type Ink } from './paper';

/** The brief as PDF: the same content and the same geometry as its page. */

const isInk = (family: string): family is Ink => family in INKS;

function placeText(paper: Paper, label: PlacedText, x: number, y: number, size: number, ink: Ink, mono: boolean): void {
	const width = 120;
	const left =
		label.anchor === 'start' ? x + label.x : label.anchor === 'end' ? x + label.x - width : x + label.x - width / 2;
	const align = label.anchor === 'start' ? 'left' : label.anchor === 'end' ? 'right' : 'center';
	paper.place(label.text, left, y + label.y - size * 0.78, width, { size, ink, mono, align });
}

function drawDays(paper: Paper, picture: DaysPicture, x: number, y: number): void {
	paper.path(picture.frame, x, y, { stroke: 'edge', width: 0.8 });
	paper.path(picture.grid, x, y, { stroke: 'grid' });
	paper.path(picture.bare, x, y, { stroke: 'edge', width: 1.6, dash: [0.8, 2] });
	paper.path(picture.strokes.ink, x, y, { fill: 'ink' });
	for (const { path, opacity } of picture.strokes.fade) paper.path(path, x, y, { fill: 'ink', opacity });
	paper.path(picture.strokes.open, x, y, { stroke: 'ink', width: 1 });
	paper.path(picture.strokes.trip, x, y, { fill: 'trip' });
	for (const label of [...picture.hours, ...picture.dates]) placeText(paper, label, x, y, 7.5, 'ink2', true);
}

function drawStart(paper: Paper, picture: StartPicture, x: number, y: number): void {
	paper.path(picture.frame, x, y, { stroke: 'edge', width: 0.8 });
	paper.path(picture.grid, x, y, { stroke: 'grid' });
	if (picture.level) paper.path(picture.level.path, x, y, { stroke: 'trip', width: 0.8 });
	paper.path(picture.zero, x, y, { stroke: 'ink', width: 0.6 });
	for (const { path, family } of picture.traces) {
		const ink = isInk(family) ? family : 'ink';
		paper.path(path, x, y, { stroke: ink, width: 1.3, ...(DASHES[ink] ? { dash: DASHES[ink] } : {}) });
	}
	paper.path(picture.trip, x, y, { stroke: 'trip', width: 1.6 });
	for (const label of [...picture.values, ...picture.times]) placeText(paper, label, x, y, 7, 'ink2', true);
	for (const { label, family } of picture.traces)
		if (label) placeText(paper, label, x, y, 7.5, isInk(family) ? family : 'ink', false);
	if (picture.level) placeText(paper, picture.level.label, x, y, 7, 'trip', false);
}

function head(paper: Paper, brief: Brief): void {
	const { visit } = brief;
	const column = 170;
	const words = paper.width - column - 10;
	const top = paper.y;
	paper.place('Firstpull  visit brief', paper.left, top, words, { size: 9.5, ink: 'ink2' });
	const name = `${visit.unitTag}${brief.circuit ? `, circuit ${brief.circuit}` : ''}, ${visit.siteName}`;
	let y = top + 16;
	y += paper.place(name, paper.left, y, words, { size: 18, bold: true }) + 2;
	for (const line of [brief.place, visit.accessNotes, visit.purpose])
		if (line) y += paper.place(line, paper.left, y, words, { size: 9.5, ink: 'ink2' }) + 1;
	const x = paper.right - column;
	const date = `${shortDate(visit.date)} ${visit.date.slice(0, 4)}${visit.beThereBy ? ', be there by' : ''}`;
	paper.place(date, x, top, column, { size: 9.5, ink: 'ink2', align: 'right' });
	if (visit.beThereBy) paper.place(visit.beThereBy, x, top + 13, column, { size: 26, mono: true, align: 'right' });
	const reason = paper.place(brief.beThereReason, x, top + 47, column, { size: 7.5, ink: 'ink2', align: 'right' });
	paper.y = Math.max(y, top + 49 + reason) + 8;
}

function cautions(paper: Paper, brief: Brief): void {
	const column = (paper.width - 36) / 2;
	const half = Math.ceil(brief.cautions.length / 2);
	const columns = [brief.cautions.slice(0, half), brief.cautions.slice(half)];
	const size = 8;
	const heights = columns.map((list) =>
		list.reduce((sum, { text, strong }) => sum + paper.height(text, column, { size, bold: strong, gap: 1 }) + 2, 0)
	);
	const height = Math.max(...heights) + 26;
	paper.room(height);
	const top = paper.y;
	paper.doc.lineWidth(1).strokeColor(INKS.ink).rect(paper.left, top, paper.width, height).stroke();
	paper.place('Cautions', paper.left + 12, top + 8, column, { size: 9.5, bold: true });
	columns.forEach((list, i) => {
		let y = top + 22;
		const x = paper.left + 12 + i * (column + 12);
		for (const { text, strong } of list) y += paper.place(text, x, y, column, { size, bold: strong, gap: 1 }) + 2;
	});
	paper.y = top + height + 10;
}

function story(paper: Paper, brief: Brief): void {
	const picture = brief.days.length > 0 ? daysPicture(brief.days, 225, 12) : null;
	const width = picture ? paper.width - picture.width - 18 : paper.width;
	const needed = brief.story.reduce((sum, { label, text }) => sum + paper.height(`${label} ${text}`, width) + 5, 0);
	paper.room(Math.max(needed, (picture?.height ?? 0) + 16));
	const top = paper.y;
	let y = top;
	for (const { label, text } of brief.story) y += paper.labelled(label, text, paper.left, y, width) + 5;
	if (picture) {
		const x = paper.right - picture.width;
		drawDays(paper, picture, x, top);
		const [first, last] = [brief.days[0]?.date ?? '', brief.days.at(-1)?.date ?? ''];
		const words = `${shortDate(first)} to ${shortDate(last)}, the site’s clock; a bar is a trip`;
		paper.place(words, x + 34, top + picture.height + 3, picture.width - 34, { size: 7.5, ink: 'ink2' });
		y = Math.max(y, top + picture.height + 16);
	}
	paper.y = y + 4;
}

function starts(paper: Paper, brief: Brief): void {
	const { axis } = brief;
	if (!axis || brief.starts.length === 0) return;
	const gap = 14;
	const width = Math.min(240, (paper.width - gap * (brief.starts.length - 1)) / brief.starts.length);
	const size = { width, height: 104 };
	paper.room(size.height + 26);
	paper.rule(0.5, 'edge', 7);
	const top = paper.y;
	brief.starts.forEach((start, i) => {
		const x = paper.left + i * (width + gap);
		paper.place(`${start.clock} ${start.day}, ${start.text}`, x, top, width, { size: 8.5, bold: true });
		paper.place(axis.symbol, x, top + 13, 30, { size: 7, ink: 'ink2', mono: true, align: 'right' });
		drawStart(paper, startPicture(start, axis, size, i === 0), x, top + 16);
	});
	paper.y = top + size.height + 24;
}

function checks(paper: Paper, brief: Brief): void {
	paper.room(60);
	paper.place('Checks, most deciding first', paper.left, paper.y, 300, { size: 11, bold: true });
	paper.place('Write down what was read', paper.right - 150, paper.y + 1, 150, { size: 8.5, ink: 'ink2' });
	paper.y += 17;
	paper.rule(1, 'ink', 6);
	if (brief.checks.length === 0)
		paper.paragraph('No suspect stands out. Read settings against the name-plate, and log what is named below.');
	brief.checks.forEach((check, i) => {
		const width = paper.width - 190;
		const lines = [
			`Decides: ${check.decides}. ${check.unitOff ? 'Unit off, locked out.' : 'With the unit as it runs.'}`,
			...(check.tools.length > 0 ? [`Bring: ${check.tools.join(', ')}.`] : [])
		];
		const height =
			paper.height(check.title, width, { bold: true }) +
			lines.reduce((sum, line) => sum + paper.height(line, width, { size: 8.5 }), 0) +
			8;
		paper.room(height);
		const top = paper.y;
		paper.place(String(i + 1), paper.left, top, 20, { size: 11, mono: true });
		let y = top + paper.place(check.title, paper.left + 24, top, width, { bold: true });
		for (const line of lines) y += paper.place(line, paper.left + 24, y, width, { size: 8.5, ink: 'ink2' });
		paper.doc.lineWidth(0.6).strokeColor(INKS.ink);
		for (const at of [top + 18, y])
			paper.doc
				.moveTo(paper.right - 150, at)
				.lineTo(paper.right, at)
				.stroke();
		paper.y = y + 4;
		paper.rule(0.4, 'grid', 5);
	});
}

/** The brief as one or two pages, on the paper of the reader's part of the world. */
export async function briefPdf(brief: Brief): Promise<Uint8Array> {
	const { visit } = brief;
	const paper = new Paper(brief.units === 'ip' ? 'LETTER' : 'A4', `Visit brief, ${visit.unitTag}, ${visit.date}`);
	head(paper, brief);
	cautions(paper, brief);
	story(paper, brief);
	starts(paper, brief);
	checks(paper, brief);
	for (const line of brief.logNext) paper.paragraph(`What to log next: ${line}`, { size: 8.5 });
	return paper.finish([
		{ label: 'Unit', value: brief.circuit ? `${visit.unitTag}, circuit ${brief.circuit}` : visit.unitTag },
		{ label: 'Technician', value: visit.technician?.name ?? 'nobody yet' },
		{ label: 'Refrigerant', value: `${brief.refrigerant}, ${brief.safetyClass}` },
		{ label: 'Log coverage', value: brief.coverage },
		{ label: 'Method', value: `version ${brief.methodVersion}` },
		{ label: 'Printed', value: formatPrintedAt(now().toISOString(), visit.timeZone) }
	]);
}
