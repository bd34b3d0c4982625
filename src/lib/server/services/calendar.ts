import type { Visit } from '$lib/model/wire/visit';
import { now } from '$lib/server/config';
import { DateTime } from 'luxon';

/** A visit as a calendar file (RFC 5545). */

const HOURS = 3;

/** Text of a property: backslash, comma, semicolon and line ends escaped (RFC 5545, 3.3.11). */
const escaped = (text: string): string =>
	text.replaceAll('\\', '\\\\').replaceAll(';', '\\;').replaceAll(',', '\\,').replaceAll(/\r?\n/g, '\\n');

/** Lines over 75 octets go on after a line end and a space (RFC 5545, 3.1). */
function folded(line: string): string {
	const parts: string[] = [];
	let part = '';
	for (const character of line) {
		const most = parts.length === 0 ? 75 : 74;
		if (Buffer.byteLength(part + character) > most) {
			parts.push(part);
			part = character;
		} else part += character;
	}
	return [...parts, part].join('\r\n ');
}

const stamp = (time: DateTime): string => time.toUTC().toFormat("yyyyMMdd'T'HHmmss'Z'");

/** The visit as a calendar entry; without a clock, a whole day. */
export function calendarOf(visit: Visit, address: string | null, link: string): string {
	const lines = [
		'BEGIN:VCALENDAR',
		'VERSION:2.0',
		'PRODID:-//Firstpull//visits//EN',
		'CALSCALE:GREGORIAN',
		'METHOD:PUBLISH',
		'BEGIN:VEVENT',
		`UID:${visit.id}@firstpull`,
		`DTSTAMP:${stamp(DateTime.fromJSDate(now()))}`
	];
	if (visit.beThereBy) {
		const from = DateTime.fromISO(`${visit.date}T${visit.beThereBy}`, { zone: visit.timeZone });
		lines.push(`DTSTART:${stamp(from)}`, `DTEND:${stamp(from.plus({ hours: HOURS }))}`);
	} else {
		const day = DateTime.fromISO(visit.date, { zone: 'utc' });
		lines.push(
			`DTSTART;VALUE=DATE:${day.toFormat('yyyyMMdd')}`,
			`DTEND;VALUE=DATE:${day.plus({ days: 1 }).toFormat('yyyyMMdd')}`
		);
	}
	const about = [visit.purpose, visit.accessNotes, `Brief: ${link}`].filter((text) => text !== '').join('\n');
	lines.push(
		`SUMMARY:${escaped(`${visit.unitTag}, ${visit.siteName}${visit.beThereBy ? `: there by ${visit.beThereBy}` : ''}`)}`,
		`LOCATION:${escaped(address ?? visit.siteName)}`,
		`DESCRIPTION:${escaped(about)}`,
		`URL:${link}`,
		'END:VEVENT',
		'END:VCALENDAR'
	);
	return `${lines.map(folded).join('\r\n')}\r\n`;
}
