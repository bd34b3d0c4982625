import { ZincReader } from 'haystack-core';
import { Readable } from 'node:stream';
import { text, buffer } from 'node:stream/consumers';
import Papa from 'papaparse';
import readExcelFile from 'read-excel-file/node';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Actor } from '$lib/model/people';
import { useFreshDatabase } from './support/fresh';

useFreshDatabase();

let actor: Actor;
let unitId: string;

/** Invented: two hours a minute apart in UTC, on from 08:30, one cell without a reading at 08:05. */
function log(): string {
	const rows = ['Time,Running,Leaving Water (°C),Motor Current (A)'];
	for (let i = 0; i < 120; i++) {
		const at = new Date(Date.UTC(2025, 4, 6, 8, i)).toISOString().slice(0, 19).replace('T', ' ');
		rows.push(`${at},${i >= 30 ? 1 : 0},${i === 5 ? '' : (7 + i / 100).toFixed(2)},${i >= 30 ? 180 : 0}`);
	}
	return rows.join('\n');
}

beforeAll(async () => {
	const { actorFor, foundOrganisation } = await import('$lib/server/services/people');
	const { addSite } = await import('$lib/server/services/sites');
	const { addUnit } = await import('$lib/server/services/units');
	const { receiveFile } = await import('$lib/server/services/incoming');
	const { takeLog } = await import('$lib/server/services/logs');
	const { runReading } = await import('$lib/server/services/reading');
	const { runAnalysis } = await import('$lib/server/services/analysing');
	const email = 'owner@firstpull.test';
	await foundOrganisation('Export', { email, name: 'Owner', password: 'a long enough one' });
	actor = await actorFor(email);
	const site = await addSite(actor, { name: 'Hall', timeZone: 'UTC' });
	const given = { siteId: site.id, tag: 'U 1', refrigerant: 'R-134a', circuits: 1, nature: {}, limits: {} } as const;
	unitId = (await addUnit(actor, given)).id;
	const file = await receiveFile(Readable.from([Buffer.from(log())]), 'log.csv');
	const { id } = await takeLog(actor, unitId, [file], { timeZone: null, mapping: 'auto', name: null });
	await runReading({ organisationId: actor.organisationId, logId: id });
	await runAnalysis({ organisationId: actor.organisationId, unitId });
});

async function exported(format: 'csv' | 'xlsx' | 'zinc', over: { from?: string; to?: string; signals?: string } = {}) {
	const { exportSamples } = await import('$lib/server/services/export');
	const window = { from: '2025-05-06T08:00:00Z', to: '2025-05-06T08:10:00Z', circuit: '1', ...over };
	const { body } = await exportSamples(actor, unitId, { ...window, format }, 'si');
	return Readable.fromWeb(body as Parameters<typeof Readable.fromWeb>[0]);
}

describe('an export of samples', () => {
	it('is CSV that another reader reads back, blanks kept blank', async () => {
		const { data } = Papa.parse<string[]>(await text(await exported('csv')), { skipEmptyLines: true });
		expect(data).toHaveLength(11);
		const water = data[0]?.findIndex((name) => name.startsWith('leaving water')) ?? -1;
		expect(data[0]?.[water]).toBe('leaving water (°C)');
		expect(data.slice(1).map((row) => row[water])).toEqual(
			Array.from({ length: 10 }, (_, i) => (i === 5 ? '' : String(Number((7 + i / 100).toFixed(2)))))
		);
		expect(data[1]?.[0]).toBe('2025-05-06T08:00:00.000Z');
	});

	it('has the chosen signals only, and refuses one that is none', async () => {
		const { data } = Papa.parse<string[]>(await text(await exported('csv', { signals: 'motorCurrent' })));
		expect(data[0]).toEqual(['time', 'motor current (A)']);
		await expect(exported('csv', { signals: 'nothing' })).rejects.toMatchObject({ kind: 'invalid' });
		await expect(exported('csv', { to: '2025-05-06T07:00:00Z' })).rejects.toMatchObject({ kind: 'invalid' });
	});

	it('is a Zinc grid that the standard’s own reader takes, with units', async () => {
		const grid = ZincReader.readValue(await text(await exported('zinc')))?.toJSON() as unknown as {
			rows: Record<string, unknown>[];
		};
		expect(grid.rows).toHaveLength(10);
		expect(grid.rows[1]).toMatchObject({ evapWaterOut: { val: 7.01, unit: '°C' } });
		expect(grid.rows[5]?.['evapWaterOut']).toBeUndefined();
	});

	it('is a spreadsheet with dates as dates and numbers as numbers', async () => {
		const bytes = await buffer(await exported('xlsx', { signals: 'evapWaterOut' }));
		const [sheet] = (await readExcelFile(bytes)) as unknown as [{ data: unknown[][] }];
		expect(sheet.data).toHaveLength(11);
		expect(sheet.data[2]?.[1]).toBe(7.01);
	});
});
