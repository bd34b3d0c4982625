/** The two parts of every message: plain text, and the same words as plain HTML. */

export type MailBody = {
	/** the finding, as the first line */
	title: string;
	/** paragraphs; a list is one paragraph of several lines that begin with "- " */
	paragraphs: readonly string[];
	/** facts as label and value */
	facts?: readonly (readonly [string, string])[];
	cautions?: readonly string[];
	/** where to go */
	link?: { words: string; href: string };
	/** why this person got it */
	because: string;
};

const escape = (text: string): string =>
	text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');

/** The plain-text part. */
export function mailText(body: MailBody): string {
	const parts = [
		body.title,
		...body.paragraphs,
		...(body.facts?.length ? [body.facts.map(([label, value]) => `${label}: ${value}`).join('\n')] : []),
		...(body.link ? [`${body.link.words}: ${body.link.href}`] : []),
		...(body.cautions?.length ? [`Cautions\n${body.cautions.map((line) => `- ${line}`).join('\n')}`] : []),
		`-- \nFirstpull. ${body.because}`
	];
	return `${parts.join('\n\n')}\n`;
}

function paragraph(text: string): string {
	const lines = text.split('\n');
	if (lines.every((line) => line.startsWith('- ')))
		return `<ul style="margin:0 0 14px;padding-left:20px">${lines.map((line) => `<li>${escape(line.slice(2))}</li>`).join('')}</ul>`;
	return `<p style="margin:0 0 14px">${lines.map(escape).join('<br>')}</p>`;
}

const INK = '#152220';
const QUIET = '#46544f';
const EDGE = '#6f7c74';

/** The mark as two small tables of colour: pictures are off in most mail. */
const MARK = `<span style="display:inline-block;border-left:4px solid ${INK};border-top:4px solid ${INK};width:12px;height:14px;margin-right:3px"></span><span style="display:inline-block;border-left:4px solid #b92f08;height:10px;margin-right:10px"></span>`;

/** The HTML part: the same words on paper, no pictures, no tracking. */
export function mailHtml(body: MailBody): string {
	const facts = body.facts?.length
		? `<table style="border-collapse:collapse;margin:0 0 16px">${body.facts
				.map(
					([label, value]) =>
						`<tr><td style="padding:3px 16px 3px 0;color:${QUIET};vertical-align:top">${escape(label)}</td><td style="padding:3px 0;font-weight:600">${escape(value)}</td></tr>`
				)
				.join('')}</table>`
		: '';
	const link = body.link
		? `<p style="margin:0 0 18px"><a href="${escape(body.link.href)}" style="display:inline-block;padding:9px 16px;background:${INK};color:#f5f7f2;text-decoration:none;font-weight:600">${escape(body.link.words)}</a></p>`
		: '';
	const cautions = body.cautions?.length
		? `<div style="border:1px solid ${EDGE};padding:10px 14px;margin:0 0 16px"><b>Cautions</b><ul style="margin:6px 0 0;padding-left:18px">${body.cautions.map((line) => `<li>${escape(line)}</li>`).join('')}</ul></div>`
		: '';
	return `<!doctype html><html lang="en"><meta charset="utf-8"><body style="margin:0;background:#f5f7f2;color:${INK};font:15px/1.45 'Hanken Grotesk',system-ui,sans-serif"><div style="max-width:600px;margin:0 auto;padding:22px 20px">
<p style="margin:0 0 16px;font-weight:600">${MARK}Firstpull</p>
<h1 style="font-size:20px;line-height:1.3;margin:0 0 14px">${escape(body.title)}</h1>
${body.paragraphs.map(paragraph).join('\n')}
${facts}${link}${cautions}
<p style="border-top:1px solid #cfd9cd;padding-top:10px;color:${QUIET};font-size:13px">${escape(body.because)}</p></div></body></html>`;
}
