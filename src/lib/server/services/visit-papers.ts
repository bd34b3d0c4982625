import { AppError } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import type { UnitSystem } from '$lib/model/quantities';
import { SAFETY_CLASSES } from '$lib/model/refrigerant-safety';
import { demand } from '$lib/server/auth/guard';
import { now } from '$lib/server/config';
import { updateVisit } from '$lib/server/repositories/circle';
import { findOrganisation, findPerson, findPersonByEmail, listMembers } from '$lib/server/repositories/identity';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { briefOf } from './brief';
import { calendarOf } from './calendar';
import { noteOnCase } from './case-timeline';
import { origin, queueLetter } from './mails';
import { briefPdf } from './pdf/brief-pdf';
import { reportPdf } from './pdf/report-pdf';
import { markReportSent, reportOf } from './report';
import { shortDate } from './site-clock';
import { visibleVisit } from './visits';

/** A visit's papers: brief and report as PDF, and both by mail. */

const PDF = 'application/pdf';

/** The brief as PDF, in one person's units. */
export async function briefPaper(actor: Actor, visitId: string, system: UnitSystem): Promise<Uint8Array> {
	return briefPdf(await briefOf(actor, visitId, system));
}

/** The report as PDF. */
export async function reportPaper(actor: Actor, visitId: string, system: UnitSystem): Promise<Uint8Array> {
	const report = await reportOf(actor, visitId, system);
	const { unit, site } = await withOrganisation(
		actor.organisationId,
		async (tx) => (await visibleVisit(tx, actor, visitId)).around
	);
	const office = (await findOrganisation(actor.organisationId))?.name ?? '';
	return reportPdf(report, {
		office,
		refrigerant: unit.refrigerant,
		safetyClass: SAFETY_CLASSES[unit.refrigerant],
		timeZone: site.timeZone,
		paper: system === 'ip' ? 'LETTER' : 'A4'
	});
}

/** Sends the brief with its PDF and a calendar file to who goes there. @throws AppError `conflict` when nobody does */
export async function sendBrief(actor: Actor, visitId: string): Promise<{ to: string }> {
	demand(actor, 'plan');
	const found = await withOrganisation(actor.organisationId, (tx) => visibleVisit(tx, actor, visitId));
	const person = found.row.technicianId ? await findPerson(found.row.technicianId) : null;
	const member = (await listMembers(actor.organisationId)).find((entry) => entry.personId === person?.id);
	if (!person || !member || member.leftAt) throw new AppError('conflict', 'Say first who goes there.');
	const brief = await briefOf(actor, visitId, person.preferences.units);
	const { visit } = brief;
	const link = `${origin()}/visits/${visitId}`;
	const day = shortDate(visit.date);
	await queueLetter(actor.organisationId, {
		kind: 'brief',
		to: person.email,
		personId: person.id,
		subject: `${visit.unitTag}, ${visit.siteName}: ${day}${visit.beThereBy ? `, be there by ${visit.beThereBy}` : ''}`,
		attachments: [
			{ name: `brief-${visit.date}.pdf`, type: PDF, bytes: await briefPdf(brief) },
			{
				name: `visit-${visit.date}.ics`,
				type: 'text/calendar; method=PUBLISH; charset=utf-8',
				bytes: new TextEncoder().encode(calendarOf(visit, found.around.site.address, link))
			}
		],
		body: {
			title: `${visit.unitTag} at ${visit.siteName}, ${day}`,
			paragraphs: brief.story.map(({ label, text }) => `${label} ${text}`),
			facts: [
				...(visit.beThereBy ? ([['Be there by', `${visit.beThereBy}, the site’s clock`]] as const) : []),
				...(visit.purpose ? ([['Purpose', visit.purpose]] as const) : []),
				...(visit.accessNotes ? ([['Access', visit.accessNotes]] as const) : []),
				...brief.checks.map((check, i) => [`Check ${i + 1}`, check.title] as const)
			],
			cautions: brief.cautions.map(({ text }) => text),
			link: { words: 'Open the brief', href: link },
			because: `${actor.name} sent you this brief.`
		}
	});
	await withOrganisation(actor.organisationId, async (tx) => {
		await updateVisit(tx, visitId, { briefSentAt: now() });
		if (visit.caseId)
			await noteOnCase(tx, actor, visit.caseId, {
				kind: 'brief',
				text: `Brief sent to ${person.name}.`,
				link: `/visits/${visitId}`
			});
	});
	return { to: person.email };
}

/** What the client reads in: a client member's own choice, else the sender's. */
async function unitsFor(email: string, fallback: UnitSystem): Promise<UnitSystem> {
	return (await findPersonByEmail(email))?.preferences.units ?? fallback;
}

/** Sends an approved report to some of the site's addresses. @throws AppError `invalid`, `conflict` */
export async function sendReport(
	actor: Actor,
	visitId: string,
	to: readonly string[],
	system: UnitSystem
): Promise<void> {
	demand(actor, 'plan');
	const allowed = (await reportOf(actor, visitId, system)).mayGoTo;
	const wrong = to.find((email) => !allowed.includes(email));
	if (to.length === 0 || wrong !== undefined)
		throw new AppError('invalid', wrong ? `${wrong} is no contact of this site.` : 'Choose who gets the report.', {
			errors: [{ field: 'to', message: 'not a contact of the site' }]
		});
	await markReportSent(actor, visitId, to);
	for (const email of to) {
		const units = await unitsFor(email, system);
		const report = await reportOf(actor, visitId, units);
		const member = await findPersonByEmail(email);
		await queueLetter(actor.organisationId, {
			kind: 'report',
			to: email,
			personId: member?.id ?? null,
			subject: `${report.unitTag}, ${report.siteName}: report of ${shortDate(report.date)}`,
			attachments: [{ name: `report-${report.date}.pdf`, type: PDF, bytes: await reportPaper(actor, visitId, units) }],
			body: {
				title: `Report of the visit to ${report.unitTag}, ${shortDate(report.date)}`,
				paragraphs: [
					`What was wrong. ${report.wrong}`,
					`How it was found. ${report.found}`,
					`What was done. ${report.done}`,
					`Proof so far. ${report.proof.join(' ')}`
				],
				cautions: ['Please do not keep resetting a trip, and leave every protection as it is.'],
				because: `${actor.name} sent you this report as a contact of ${report.siteName}.`
			}
		});
	}
	await withOrganisation(actor.organisationId, async (tx) => {
		const { row } = await visibleVisit(tx, actor, visitId);
		if (row.caseId)
			await noteOnCase(tx, actor, row.caseId, {
				kind: 'report',
				text: `Report sent to ${to.length} at the site.`,
				link: `/visits/${visitId}`
			});
	});
}
