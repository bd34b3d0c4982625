import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { StartRecord } from '$lib/model/start';
import { caseInputSchema } from '$lib/model/wire/case';
import { changeInputSchema } from '$lib/model/wire/field';
import { visitInputSchema } from '$lib/model/wire/visit';
import { startRecord, trippedRecord } from '../../fixtures/inference/start-record';
import { useFreshDatabase } from './support/fresh';
import { deliver } from './support/letters';
import { invitedOffice, type Office } from './support/office';
import { attachmentOf, plainText, usePost } from './support/post';

// Invented office and starts throughout.
useFreshDatabase();
const post = usePost();
let office: Office;
const DAY = 86_400_000;
const morning = (daysAgo: number): number => (Math.floor(Date.now() / DAY) - daysAgo) * DAY + 6 * 3_600_000;

beforeAll(async () => {
	office = await invitedOffice();
});
beforeEach(() => {
	post.messages.length = 0;
	post.refuse = false;
});

async function keepStarts(records: StartRecord[]): Promise<void> {
	const { withOrganisation } = await import('$lib/server/repositories/transaction');
	const { replaceStarts } = await import('$lib/server/repositories/starts');
	const made = records.map((record) => ({ record, extras: { clues: { si: [], ip: [] }, firstMover: null } }));
	await withOrganisation(office.organisationId, (tx) => replaceStarts(tx, office.organisationId, office.unitId, made));
}

/** Text and page count of a PDF, read by another program (poppler). */
function readPdf(bytes: Uint8Array): { text: string; pages: number } {
	const folder = mkdtempSync(join(tmpdir(), 'firstpull-pdf-'));
	try {
		const file = join(folder, 'paper.pdf');
		writeFileSync(file, bytes);
		execFileSync('pdftotext', ['-layout', file, join(folder, 'paper.txt')]);
		const text = readFileSync(join(folder, 'paper.txt'), 'utf8');
		return { text, pages: (text.match(/\f/g) ?? []).length };
	} finally {
		rmSync(folder, { recursive: true });
	}
}
const hasPoppler = (): boolean => {
	try {
		execFileSync('pdftotext', ['-v'], { stdio: 'ignore' });
		return true;
	} catch {
		return false;
	}
};

describe('a start-up trip that repeats', () => {
	const job = () => ({ organisationId: office.organisationId, unitId: office.unitId });

	it('is mailed to the managers while nobody is on call, once a day, with cautions and both parts', async () => {
		const { tellRepeatTrips } = await import('$lib/server/services/repeat-trips');
		await keepStarts([trippedRecord(morning(3)), trippedRecord(morning(1))]);
		await tellRepeatTrips(job());
		await tellRepeatTrips(job());
		await deliver(office);
		expect(post.messages.map(({ to }) => to)).toEqual([['manager@office.test']]);
		const raw = post.messages[0]?.raw ?? '';
		const text = plainText(raw);
		expect(text).toContain('U 1, circuit 1 at Hall A tripped at its start again');
		expect(text).toContain('2 start-up trips of this kind in 14 days');
		expect(text).toContain('Leave every protection as it is');
		expect(raw).toMatch(/text\/plain[\s\S]*text\/html/);
		expect(raw).toMatch(/List-Unsubscribe-Post: List-Unsubscribe=One-Click/);
		expect(raw).not.toMatch(/<img/);
	});

	it('goes to the person on call, and not to who chose not to be told', async () => {
		const { tellRepeatTrips } = await import('$lib/server/services/repeat-trips');
		const { unsubscribe } = await import('$lib/server/services/mails');
		const { changeSite } = await import('$lib/server/services/sites');
		await changeSite(office.owner, office.siteId, { onCallId: office.technician.personId });
		await keepStarts([trippedRecord(morning(5)), trippedRecord(morning(2))]);
		await tellRepeatTrips(job());
		await deliver(office);
		expect(post.messages.map(({ to }) => to)).toEqual([['technician@office.test']]);
		const token = /unsubscribe\?token=([\w-]+)/.exec(plainText(post.messages[0]?.raw ?? ''))?.[1] ?? '';
		expect(await unsubscribe('wrong')).toBe(false);
		expect(await unsubscribe(token)).toBe(true);
		await keepStarts([trippedRecord(morning(6)), trippedRecord(morning(4))]);
		await tellRepeatTrips(job());
		await deliver(office);
		expect(post.messages.map(({ to }) => to)).toEqual([['technician@office.test'], ['manager@office.test']]);
	});

	it('is not told of a single trip, of an attended one, or when the unit ran on for days after it', async () => {
		const { tellRepeatTrips } = await import('$lib/server/services/repeat-trips');
		for (const records of [
			[trippedRecord(morning(1))],
			[trippedRecord(morning(9)), trippedRecord(morning(7), { attended: true })],
			[trippedRecord(morning(9)), trippedRecord(morning(8)), startRecord(morning(1))]
		]) {
			await keepStarts(records);
			await tellRepeatTrips(job());
		}
		await deliver(office);
		expect(post.messages).toEqual([]);
	});
});

describe('the outbox', () => {
	it('shows a failure with the server’s words, and a try again that works', async () => {
		const { mailsOf, queueLetter, retryMail, sendMail } = await import('$lib/server/services/mails');
		post.refuse = true;
		const id = await queueLetter(office.organisationId, {
			kind: 'security',
			to: 'someone@office.test',
			subject: 'Invented',
			body: { title: 'Invented', paragraphs: [], because: 'a test' }
		});
		const job = { organisationId: office.organisationId, mailId: id ?? '' };
		await expect(sendMail(job)).rejects.toThrow(/no mail today/);
		const failed = (await mailsOf(office.manager)).find((mail) => mail.id === id);
		expect(failed).toMatchObject({ state: 'failed', tries: 1, error: expect.stringContaining('no mail today') });
		post.refuse = false;
		await retryMail(office.manager, id ?? '');
		await sendMail(job);
		await sendMail(job);
		expect(post.messages).toHaveLength(1);
		await expect(mailsOf(office.technician)).rejects.toMatchObject({ kind: 'forbidden' });
	});

	it('keeps no link that lets somebody in, once it is sent', async () => {
		const { mailsOf, queueLetter } = await import('$lib/server/services/mails');
		await queueLetter(office.organisationId, {
			kind: 'reset',
			to: 'someone@office.test',
			subject: 'Invented secret',
			body: {
				title: 'Invented',
				paragraphs: [],
				link: { words: 'Choose', href: 'https://firstpull.test/reset?token=s3cret-s3cret' },
				because: 'a test'
			}
		});
		await deliver(office);
		expect(plainText(post.messages[0]?.raw ?? '')).toContain('token=s3cret-s3cret');
		const { withOrganisation } = await import('$lib/server/repositories/transaction');
		const { listMails } = await import('$lib/server/repositories/mails');
		const rows = await withOrganisation(office.organisationId, (tx) => listMails(tx, 50));
		expect(JSON.stringify(rows)).not.toContain('s3cret');
		expect((await mailsOf(office.owner))[0]?.subject).toBe('Invented secret');
	});
});

describe('the week', () => {
	it('is sent once to managers and owners: repeaters, what waits, what came back', async () => {
		const { sendDigests } = await import('$lib/server/services/digest');
		const { openCase } = await import('$lib/server/services/cases');
		await keepStarts([trippedRecord(morning(3)), trippedRecord(morning(1))]);
		await openCase(office.manager, caseInputSchema.parse({ unitId: office.unitId, complaint: 'Waits' }), 'si');
		const inTenDays = new Date(Date.now() + 10 * DAY);
		await sendDigests(new Date());
		await sendDigests(new Date());
		await deliver(office);
		expect(post.messages.map(({ to }) => to.join()).sort()).toEqual(['manager@office.test', 'owner@office.test']);
		expect(plainText(post.messages[0]?.raw ?? '')).toContain('U 1, Hall A, circuit 1: 2 start-up trips in 14 days');
		post.messages.length = 0;
		await sendDigests(inTenDays);
		await deliver(office);
		expect(plainText(post.messages[0]?.raw ?? '')).toMatch(
			/Open for over a week, nobody planned[\s\S]*C-1, U 1, Hall A: Waits/
		);
	});
});

describe('late deliveries', () => {
	it('are told once, until the next log comes', async () => {
		const { lateBy, tellLateLogs } = await import('$lib/server/services/deliveries');
		const { changeUnit } = await import('$lib/server/services/units');
		const since = new Date('2026-03-01T00:00:00Z');
		// A day's delivery has a quarter more patience: 30 h (ours, worked by hand).
		expect(lateBy(24, since, new Date('2026-03-02T05:00:00Z'))).toBeNull();
		expect(lateBy(24, since, new Date('2026-03-02T07:00:00Z'))).toBe(7);
		expect(lateBy(null, since, new Date('2027-03-01T00:00:00Z'))).toBeNull();
		await changeUnit(office.owner, office.unitId, { deliveryHours: 24 });
		const { comingsOf } = await import('$lib/server/services/deliveries');
		expect((await comingsOf(office.manager)).get(office.unitId)).toEqual({ lastAt: null, lateHours: null });
		const later = (await comingsOf(office.manager, new Date(Date.now() + 2 * DAY))).get(office.unitId);
		expect(later?.lateHours).toBeCloseTo(24, 0);
		await tellLateLogs(new Date(Date.now() + 2 * DAY));
		await tellLateLogs(new Date(Date.now() + 3 * DAY));
		await deliver(office);
		expect(post.messages.map(({ to }) => to.join()).sort()).toEqual(['engineer@office.test', 'technician@office.test']);
		expect(plainText(post.messages[0]?.raw ?? '')).toContain('None has come yet');
	});
});

describe('brief and report', () => {
	it('go out as mail with a PDF that other programs read', { skip: !hasPoppler(), timeout: 120_000 }, async () => {
		const { planVisit } = await import('$lib/server/services/visits');
		const { reportOf, saveReport } = await import('$lib/server/services/report');
		const { sendBrief, sendReport } = await import('$lib/server/services/visit-papers');
		const { recordChange } = await import('$lib/server/services/changes');
		await keepStarts([5, 4, 3, 2].flatMap((day) => [trippedRecord(morning(day)), startRecord(morning(day) + 900_000)]));
		const { openCase } = await import('$lib/server/services/cases');
		await openCase(office.manager, caseInputSchema.parse({ unitId: office.unitId, complaint: 'Goes out' }), 'si');
		const visit = await planVisit(
			office.manager,
			visitInputSchema.parse({
				unitId: office.unitId,
				date: '2027-01-11',
				beThereBy: '05:40',
				technicianId: office.technician.personId,
				purpose: 'See the first start'
			})
		);
		const changed = { kind: 'valve', text: 'Valve replaced', caseId: visit.caseId };
		await recordChange(office.technician, office.unitId, changeInputSchema.parse(changed));
		await expect(sendBrief(office.technician, visit.id)).rejects.toMatchObject({ kind: 'forbidden' });
		await sendBrief(office.manager, visit.id);
		await deliver(office);
		const mail = post.messages.find(({ to }) => to.includes('technician@office.test'))?.raw ?? '';
		const calendar = attachmentOf(mail, /\.ics/)?.toString() ?? plainText(mail);
		expect(calendar).toContain('DTSTART:20270111T044000Z');
		const brief = readPdf(attachmentOf(mail, /\.pdf/) ?? new Uint8Array());
		expect(brief.pages).toBeLessThanOrEqual(2);
		for (const words of [
			'U 1, circuit 1, Hall A',
			'05:40',
			'Cautions',
			'safety class A1',
			'The call.',
			'Checks, most deciding first'
		])
			expect(brief.text).toContain(words);

		await expect(reportOf(office.client, visit.id, 'si')).rejects.toMatchObject({ kind: 'not-found' });
		const draft = await reportOf(office.manager, visit.id, 'si');
		expect(draft.done).toContain('Valve replaced');
		expect(draft.mayGoTo).toEqual(['client@office.test']);
		const words = { wrong: draft.wrong, found: 'From the logs.', done: draft.done };
		await expect(sendReport(office.manager, visit.id, ['client@office.test'], 'si')).rejects.toMatchObject({
			kind: 'conflict'
		});
		await saveReport(office.manager, visit.id, { ...words, approve: true }, 'si');
		const changedAfter = await saveReport(
			office.technician,
			visit.id,
			{ ...words, found: 'Otherwise.', approve: false },
			'si'
		);
		expect(changedAfter.approvedAt).toBeNull();
		await saveReport(office.manager, visit.id, { ...words, approve: true }, 'si');
		await expect(sendReport(office.manager, visit.id, ['else@where.test'], 'si')).rejects.toMatchObject({
			kind: 'invalid'
		});
		post.messages.length = 0;
		await sendReport(office.manager, visit.id, ['client@office.test'], 'si');
		await deliver(office);
		const sent = post.messages[0]?.raw ?? '';
		const report = readPdf(attachmentOf(sent, /\.pdf/) ?? new Uint8Array());
		expect(report.pages).toBe(1);
		for (const text of ['What was wrong', 'From the logs.', 'Valve replaced', 'Proof so far', 'manager'])
			expect(report.text).toContain(text);
		expect((await reportOf(office.client, visit.id, 'si')).sentTo).toEqual(['client@office.test']);
	});
});
