import type { Report } from '$lib/model/wire/visit';
import { formatPrintedAt } from '$lib/utils/clock';
import { now } from '$lib/server/config';
import { shortDate } from '../site-clock';
import { Paper } from './paper';

/** The client's report as PDF, one page as a rule. */
export async function reportPdf(
	report: Report,
	about: { office: string; refrigerant: string; safetyClass: string; timeZone: string; paper: 'A4' | 'LETTER' }
): Promise<Uint8Array> {
	const paper = new Paper(about.paper, `Report, ${report.unitTag}, ${report.date}`);
	paper.paragraph(`${about.office}  report of a visit`, { ink: 'ink2' }, 4);
	paper.paragraph(`${report.unitTag}, ${report.siteName}`, { size: 18, bold: true }, 2);
	paper.paragraph(`${shortDate(report.date)} ${report.date.slice(0, 4)}`, { mono: true }, 10);
	paper.rule(1, 'ink', 12);
	const parts: readonly (readonly [string, readonly string[]])[] = [
		['What was wrong', [report.wrong]],
		['How it was found', [report.found]],
		['What was done', [report.done]],
		['Proof so far', report.proof],
		['Signed readings', report.checks]
	];
	for (const [title, texts] of parts) {
		if (texts.length === 0) continue;
		paper.room(40);
		paper.paragraph(title, { size: 11, bold: true }, 3);
		for (const text of texts) paper.paragraph(text, { size: 10 }, 4);
		paper.y += 8;
	}
	paper.room(50);
	paper.rule(0.4, 'grid', 8);
	paper.paragraph(
		`Only qualified people work on this equipment; the maker’s manual and local codes come first. Refrigerant ${about.refrigerant}, safety class ${about.safetyClass} (ASHRAE 34). Please do not keep resetting a trip: each failing start can damage the compressor.`,
		{ size: 8.5, ink: 'ink2' }
	);
	return paper.finish([
		{ label: 'Unit', value: report.unitTag },
		{ label: 'Site', value: report.siteName },
		{ label: 'Approved by', value: report.approvedBy ?? 'nobody yet: a draft' },
		{ label: 'Printed', value: formatPrintedAt(now().toISOString(), about.timeZone) }
	]);
}
