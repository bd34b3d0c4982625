import exceljs from 'exceljs';
import { strFromU8, unzipSync } from 'fflate';
import { readdirSync } from 'node:fs';
import { Readable } from 'node:stream';
import { beforeAll, describe, expect, it } from 'vitest';
import { caseInputSchema } from '$lib/model/wire/case';
import { changeInputSchema, checkInputSchema } from '$lib/model/wire/field';
import { knownCases } from '../../fixtures/known/index';
import { useFreshDatabase } from './support/fresh';
import { invitedOffice, PASSWORD, type Office } from './support/office';
import { usePost } from './support/post';

// Two invented offices throughout.
useFreshDatabase();
usePost();
let office: Office;
let other: Office;

beforeAll(async () => {
	office = await invitedOffice();
	other = await invitedOffice('Other');
});

const CSV = Buffer.from(knownCases()[0]?.csv ?? '');
/** Takes a log in as the route does. */
async function upload(target: Office): Promise<string> {
	const { receiveFile } = await import('$lib/server/services/incoming');
	const { takeLog } = await import('$lib/server/services/logs');
	const file = await receiveFile(Readable.from([CSV]), 'morning.csv');
	return (await takeLog(target.owner, target.unitId, [file], { timeZone: null, mapping: 'auto', name: null })).id;
}
const bytesOf = async (stream: ReadableStream<Uint8Array>): Promise<Uint8Array> =>
	new Uint8Array(await new Response(stream).arrayBuffer());

describe('jobs', () => {
	it('are seen by their own office, and a failed one is tried again by it alone', async () => {
		const { jobsOf, retryOfficeJob } = await import('$lib/server/services/office');
		const { JOBS, queue } = await import('$lib/server/jobs/queue');
		const logId = await upload(office);
		const waiting = (await jobsOf(office.manager)).find((job) => job.data['logId'] === logId);
		expect(waiting).toMatchObject({ name: JOBS.readLog, state: 'created' });
		expect(await jobsOf(other.owner)).toEqual([]);
		const id = waiting?.id ?? '';
		await expect(retryOfficeJob(office.manager, id)).rejects.toMatchObject({ kind: 'not-found' });
		const boss = await queue();
		const job = await boss.send('invented-job', {}).catch(() => null);
		expect(job).toBeNull();
		const failing = await boss.send(JOBS.readLog, { organisationId: office.organisationId, logId }, { retryLimit: 0 });
		await boss.fetch(JOBS.readLog, { batchSize: 10 });
		await boss.fail(JOBS.readLog, failing ?? '', { message: 'the disk is full' });
		const failed = (await jobsOf(office.owner)).find((row) => row.id === failing);
		expect(failed).toMatchObject({ state: 'failed', error: 'the disk is full' });
		await expect(retryOfficeJob(other.owner, failing ?? '')).rejects.toMatchObject({ kind: 'not-found' });
		await expect(retryOfficeJob(office.technician, failing ?? '')).rejects.toMatchObject({ kind: 'forbidden' });
		await retryOfficeJob(office.manager, failing ?? '');
		expect((await jobsOf(office.owner)).find((row) => row.id === failing)?.state).not.toBe('failed');
	});
});

describe('settings', () => {
	it('are the owner’s, keep what is not changed, and name a present member for calls', async () => {
		const { changeSettings, settingsOf } = await import('$lib/server/services/office');
		await changeSettings(office.owner, { onCallId: office.technician.personId });
		await changeSettings(office.owner, { name: 'Renamed' });
		expect(await settingsOf(office.manager)).toEqual({
			name: 'Renamed',
			requireTwoStep: false,
			onCallId: office.technician.personId
		});
		for (const onCallId of [office.client.personId, other.technician.personId])
			await expect(changeSettings(office.owner, { onCallId })).rejects.toMatchObject({
				errors: [{ field: 'onCallId' }]
			});
		await expect(changeSettings(office.manager, { name: 'No' })).rejects.toMatchObject({ kind: 'forbidden' });
		await expect(settingsOf(office.technician)).rejects.toMatchObject({ kind: 'forbidden' });
	});
});

describe('search', () => {
	it('finds units, cases, checks and changes by every word, in any order, case and accent', async () => {
		const { search } = await import('$lib/server/services/search');
		const { openCase } = await import('$lib/server/services/cases');
		const { recordCheck } = await import('$lib/server/services/checks');
		const { recordChange } = await import('$lib/server/services/changes');
		const { unitId } = office;
		await openCase(office.manager, caseInputSchema.parse({ unitId, complaint: 'Stops before the Café opens' }), 'si');
		const check = { kind: 'note', readings: { text: 'Sight glass clear' } };
		await recordCheck(office.technician, unitId, checkInputSchema.parse(check), 'si');
		await recordChange(office.technician, unitId, changeInputSchema.parse({ kind: 'valve', text: 'Valve replaced' }));
		const kinds = async (q: string, actor = office.engineer) => (await search(actor, q)).map(({ kind }) => kind);
		expect(await kinds('hall u')).toContain('unit');
		expect(await kinds('CAFE stops')).toEqual(['case']);
		expect(await kinds('c-1')).toContain('case');
		expect(await kinds('clear sight')).toEqual(['check']);
		expect(await kinds('valve')).toEqual(['change']);
		expect(await kinds('valve nowhere')).toEqual([]);
		expect(await kinds('  ')).toEqual([]);
		expect(await kinds('clear sight', office.client)).toEqual([]);
		expect(await kinds('valve', other.owner)).toEqual([]);
		expect(await kinds('u 1', { ...office.technician, siteIds: [office.otherSiteId] })).toEqual([]);
	});
});

describe('sites and units from a sheet', () => {
	const HEAD = 'Site;Time zone;Unit;Refrigerant;Circuits;Altitude (m)';

	it('come from CSV and xlsx; what is there already is left alone', async () => {
		const { importPlant } = await import('$lib/server/services/plant-import');
		const { unitsOf } = await import('$lib/server/services/units');
		const csv = `${HEAD}\nDepot;Europe/Oslo;K1;R-134a;2;12,5\nDepot;Europe/Oslo;K2;R-513A;;\nHall A;Europe/Berlin;U 1;R-134a;2;\n`;
		expect(await importPlant(office.engineer, Buffer.from(csv))).toEqual({ sites: 1, units: 2, known: 1 });
		expect(await importPlant(office.engineer, Buffer.from(csv))).toEqual({ sites: 0, units: 0, known: 3 });
		const book = new exceljs.Workbook();
		const sheet = book.addWorksheet('plant');
		sheet.addRows([
			['unit', 'site', 'time zone', 'refrigerant', 'circuits'],
			['K3', 'Depot', 'Europe/Oslo', 'R-134a', 1]
		]);
		expect(await importPlant(office.engineer, new Uint8Array(await book.xlsx.writeBuffer()))).toEqual({
			sites: 0,
			units: 1,
			known: 0
		});
		const made = (await unitsOf(office.engineer)).filter(({ tag }) => tag.startsWith('K'));
		expect(made.map(({ tag, circuits }) => [tag, circuits]).sort()).toEqual([
			['K1', 2],
			['K2', 1],
			['K3', 1]
		]);
	});

	it('name the line that does not fit, and nothing is added then', async () => {
		const { importPlant } = await import('$lib/server/services/plant-import');
		const { unitsOf } = await import('$lib/server/services/units');
		const before = (await unitsOf(office.owner)).length;
		const refused = async (csv: string) => importPlant(office.owner, Buffer.from(csv)).catch((error: unknown) => error);
		expect(await refused(`${HEAD}\nNew;Europe/Oslo;N1;R-134a;1;\nNew;Somewhere;N2;R-134a;1;\n`)).toMatchObject({
			kind: 'invalid',
			errors: [{ line: 3, field: 'timeZone' }]
		});
		expect(await refused(`${HEAD}\nNew;Europe/Oslo;N1;R-134a;9;\n`)).toMatchObject({ errors: [{ line: 2 }] });
		expect(await refused(`${HEAD}\nN;UTC;N1;R-134a;1;\nN;UTC;N1;R-134a;1;\n`)).toMatchObject({
			errors: [{ line: 3, field: 'unit' }]
		});
		expect(await refused('a,b\n1,2\n')).toMatchObject({ kind: 'invalid', errors: [{ line: 1 }, {}, {}, {}] });
		expect(await refused('PK\u0003\u0004 no spreadsheet')).toMatchObject({ kind: 'invalid' });
		await expect(importPlant(office.technician, Buffer.from(HEAD))).rejects.toMatchObject({ kind: 'forbidden' });
		const one = { ...office.engineer, siteIds: [office.siteId] };
		const elsewhere = Buffer.from(`${HEAD}\nHall B;America/Chicago;N9;R-134a;1;\n`);
		await expect(importPlant(one, elsewhere)).rejects.toMatchObject({ kind: 'forbidden', errors: [{ line: 2 }] });
		expect((await unitsOf(office.owner)).length).toBe(before);
	});
});

describe('a twin', () => {
	it('takes over nature, limits and, at another site, the mappings people confirmed', async () => {
		const { copyToTwin } = await import('$lib/server/services/twin');
		const { addUnit, unitOf } = await import('$lib/server/services/units');
		const { withOrganisation } = await import('$lib/server/repositories/transaction');
		const { findRemembered, remember } = await import('$lib/server/repositories/logs');
		const { organisationId, siteId, otherSiteId, unitId } = office;
		const twin = await addUnit(office.owner, {
			siteId: otherSiteId,
			tag: 'U 2',
			refrigerant: 'R-134a',
			circuits: 2,
			nature: {},
			limits: { oilLevelLow: 5 }
		});
		await withOrganisation(organisationId, (tx) =>
			remember(tx, { organisationId, siteId, signature: 's', mapping: { columns: [{ unitId }] } } as never)
		);
		await copyToTwin(office.engineer, unitId, twin.id, { nature: true, limits: true, mapping: true });
		const [from, to] = [await unitOf(office.owner, unitId), await unitOf(office.owner, twin.id)];
		expect(to.nature).toEqual(from.nature);
		expect(to.limits.oilLevelLow).toMatchObject([{ value: 100 }]);
		expect(to.limits.oilLevelHigh).toMatchObject([{ value: 220 }]);
		const known = await withOrganisation(organisationId, (tx) => findRemembered(tx, otherSiteId));
		expect(known.filter((row) => row.siteId === otherSiteId)).toMatchObject([
			{ signature: 's', mapping: { columns: [{ unitId: twin.id }] } }
		]);
		const all = { nature: true, limits: true, mapping: true };
		await expect(copyToTwin(office.engineer, unitId, unitId, all)).rejects.toMatchObject({ kind: 'invalid' });
		await expect(copyToTwin(office.technician, unitId, twin.id, all)).rejects.toMatchObject({ kind: 'forbidden' });
		await expect(copyToTwin(other.engineer, unitId, other.unitId, all)).rejects.toMatchObject({ kind: 'not-found' });
	});
});

describe('everything as a zip', () => {
	it('has the tables, the originals byte for byte, and nothing of another office or of anybody’s secrets', async () => {
		const { exportOffice } = await import('$lib/server/services/office-export');
		const { askReset } = await import('$lib/server/services/password-reset');
		await askReset('manager@office.test', '10.4.0.1');
		await upload(other);
		const files = unzipSync(await bytesOf(await exportOffice(office.owner)));
		const names = Object.keys(files);
		for (const table of ['units', 'sites', 'cases', 'checks', 'changes', 'logs', 'audit', 'mails'])
			expect(names).toContain(`tables/${table}.jsonl`);
		const log = names.find((name) => name.endsWith('morning.csv')) ?? '';
		expect(Buffer.from(files[log] ?? []).equals(CSV)).toBe(true);
		expect(names.filter((name) => name.startsWith('logs/'))).toHaveLength(1);
		const everything = Object.entries(files)
			.filter(([name]) => !name.startsWith('logs/'))
			.map(([, bytes]) => strFromU8(bytes))
			.join('\n');
		expect(everything).toContain('manager@office.test');
		expect(everything).not.toContain('@other.test');
		expect(everything).not.toContain(other.unitId);
		expect(everything).not.toContain('argon2');
		expect(everything).toContain('/reset?token=…');
		expect(everything).not.toMatch(/token=[\w-]{10}/);
		const rows = strFromU8(files['tables/units.jsonl'] ?? new Uint8Array())
			.trim()
			.split('\n')
			.map((line) => JSON.parse(line) as { tag: string });
		expect(rows.map(({ tag }) => tag)).toContain('U 1');
		expect(readdirSync(process.env.DATA_DIR ?? '').filter((name) => name.startsWith('export-'))).toEqual([]);
		await expect(exportOffice(office.manager)).rejects.toMatchObject({ kind: 'forbidden' });
	});
});

describe('the end of an office', () => {
	it('wants its name and the password, takes its rows and originals, and leaves the other office alone', async () => {
		const { endOffice } = await import('$lib/server/services/office');
		const { findPersonByEmail, listOrganisations } = await import('$lib/server/repositories/identity');
		const { exportOffice } = await import('$lib/server/services/office-export');
		const { objectKeysOf } = await import('$lib/server/services/office-export');
		const { objectStore } = await import('$lib/server/store');
		const { queueLetter } = await import('$lib/server/services/mails');
		const pdf = { name: 'invented.pdf', type: 'application/pdf', bytes: Buffer.from('invented') };
		const body = { title: 'Invented', paragraphs: [], because: 'a test' };
		const letter = { kind: 'brief' as const, to: 'a@office.test', subject: 'Invented', body, attachments: [pdf] };
		await queueLetter(office.organisationId, letter);
		const keys = await objectKeysOf(office.organisationId);
		expect(keys).toHaveLength(2);
		const end = (name: string, password: string) => endOffice(office.owner, { name, password });
		await expect(end('Renamed', 'not it')).rejects.toMatchObject({ errors: [{ field: 'password' }] });
		await expect(end('renamed', PASSWORD)).rejects.toMatchObject({ errors: [{ field: 'name' }] });
		await expect(endOffice(office.manager, { name: 'Renamed', password: PASSWORD })).rejects.toMatchObject({
			kind: 'forbidden'
		});
		await end('Renamed', PASSWORD);
		expect((await listOrganisations()).map(({ id }) => id)).toEqual([other.organisationId]);
		expect(await findPersonByEmail('manager@office.test')).toBeNull();
		expect(await findPersonByEmail('manager@other.test')).not.toBeNull();
		for (const key of keys)
			await expect(async () => {
				for await (const _chunk of objectStore().open(key));
			}, key).rejects.toThrow();
		const left = unzipSync(await bytesOf(await exportOffice(other.owner)));
		expect(Object.keys(left).filter((name) => name.startsWith('logs/'))).toHaveLength(1);
	});
});
