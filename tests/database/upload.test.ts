import { Readable } from 'node:stream';
import { gzipSync } from 'node:zlib';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Actor } from '$lib/model/people';
import type { Log } from '$lib/model/wire/log';
import { knownCases } from '../../fixtures/known/index';
import { useFreshDatabase } from './support/fresh';

useFreshDatabase();

let actor: Actor;
beforeAll(async () => {
	const { actorFor, foundOrganisation } = await import('$lib/server/services/people');
	await foundOrganisation('Known answers', {
		email: 'owner@firstpull.test',
		name: 'Owner',
		password: 'a long enough one'
	});
	actor = await actorFor('owner@firstpull.test');
});

async function newUnit(tag: string, over: Partial<ReturnType<typeof knownCases>[number]> = {}): Promise<string> {
	const { addSite } = await import('$lib/server/services/sites');
	const { addUnit } = await import('$lib/server/services/units');
	const site = await addSite(actor, { name: `Site of ${tag}`, timeZone: over.timeZone ?? 'UTC' });
	const { refrigerant = 'R-134a', circuits = 1, nature = {}, limits = {} } = over;
	return (await addUnit(actor, { siteId: site.id, tag, refrigerant, circuits, nature, limits })).id;
}

/** Takes the bytes in as the route does, then does what the worker does with them. */
async function upload(unitId: string, bytes: Uint8Array, name: string): Promise<Log> {
	const { receiveFile } = await import('$lib/server/services/incoming');
	const { logRowOf, takeLog } = await import('$lib/server/services/logs');
	const { logShape } = await import('$lib/server/services/log-shapes');
	const { runReading } = await import('$lib/server/services/reading');
	const { runAnalysis } = await import('$lib/server/services/analysing');
	const file = await receiveFile(Readable.from([Buffer.from(bytes)]), name);
	const taken = await takeLog(actor, unitId, [file], { timeZone: null, mapping: 'auto', name: null });
	expect(taken.state).toBe('received');
	const { organisationId } = actor;
	for (const touched of (await runReading({ organisationId, logId: taken.id })) ?? [])
		await runAnalysis({ organisationId, unitId: touched });
	return logShape(await logRowOf(actor, taken.id));
}

const startsOf = async (unitId: string) =>
	(await import('$lib/server/services/starts')).startsOf(actor, unitId, {}, 'si');

describe.each(knownCases().map((known) => [known.name, known] as const))('%s', (name, known) => {
	it(`comes out of the store as worked by hand (${known.source.slice(0, 60)})`, async () => {
		const unitId = await newUnit(name, known);
		const log = await upload(unitId, Buffer.from(known.csv), `${name}.csv`);
		expect(log.state, JSON.stringify(log.problems)).toBe('ready');
		const starts = await startsOf(unitId);
		expect(starts.map((start) => [start.circuit, Date.parse(start.startedAt), start.outcome])).toEqual(
			known.expect.map((start) => [start.circuit, Date.parse(start.startedAt), start.outcome])
		);
		known.expect.forEach((expected, i) => {
			const start = starts[i];
			expect(start?.trip?.kind ?? null).toBe(expected.trip?.kind ?? null);
			for (const [key, figure] of Object.entries(expected.figures ?? {})) {
				expect(Math.abs((start?.figures[key] ?? NaN) - figure.value), key).toBeLessThanOrEqual(figure.within + 1e-6);
			}
			for (const key of expected.absent ?? []) expect(start?.absent[key], key).toBeTruthy();
		});
	});
});

const first = knownCases()[0];

describe('a log', () => {
	it('with the same bytes is one log, packed or not under another name', async () => {
		const unitId = await newUnit('Twice', first);
		const bytes = Buffer.from(first?.csv ?? '');
		const log = await upload(unitId, bytes, 'a.csv');
		await expect(upload(unitId, bytes, 'b.csv')).rejects.toMatchObject({
			kind: 'conflict',
			location: `/api/logs/${log.id}`
		});
	});

	it('uploaded again packed wins over the first, and its removal gives the first back', async () => {
		const { removeLog } = await import('$lib/server/services/logs');
		const { runAnalysis } = await import('$lib/server/services/analysing');
		const unitId = await newUnit('Over', first);
		const bytes = Buffer.from(first?.csv ?? '');
		await upload(unitId, bytes, 'a.csv');
		const before = await startsOf(unitId);
		const packed = await upload(unitId, gzipSync(bytes), 'a.csv.gz');
		expect((await startsOf(unitId)).map((start) => start.id)).toEqual(before.map((start) => start.id));
		await removeLog(actor, packed.id);
		await runAnalysis({ organisationId: actor.organisationId, unitId });
		expect(await startsOf(unitId)).toEqual(before);
	});

	it('that overlaps another counts where they differ', async () => {
		const unitId = await newUnit('Differs');
		const rows = (from: number, water: number) =>
			['Time,Compressor Running,Leaving Water (°C)']
				.concat(
					Array.from({ length: 90 }, (_, i) => {
						const at = new Date(Date.UTC(2025, 2, 4, 6, from + i)).toISOString().slice(0, 19).replace('T', ' ');
						return `${at},${from + i > 20 ? 1 : 0},${(water + (from + i) / 100).toFixed(2)}`;
					})
				)
				.join('\n');
		const one = await upload(unitId, Buffer.from(rows(0, 7)), 'one.csv');
		expect(one.quality.conflicts).toBe(0);
		// Worked by hand: the last 30 of the first's 90 minutes come again with other water, and like running.
		const two = await upload(unitId, Buffer.from(rows(60, 8)), 'two.csv');
		expect(two.quality.conflicts).toBe(30);
	});

	it('with a header confirmed at one site is known at another of the organisation, on its own clock', async () => {
		const { confirmMapping, logRowOf } = await import('$lib/server/services/logs');
		const { runReading } = await import('$lib/server/services/reading');
		const rows = (month: string) =>
			['Time;Compressor Running;Pipe A;Pipe B']
				.concat(
					Array.from(
						{ length: 60 },
						(_, i) => `2025-${month}-04 06:${String(i).padStart(2, '0')};${i > 9 ? 1 : 0};12,${i};7,${i}`
					)
				)
				.join('\n');
		const first = await newUnit('Shares', { timeZone: 'Europe/Berlin' });
		const asked = await upload(first, Buffer.from(rows('02')), 'week.csv');
		const column = (name: string) => asked.mapping.find((entry) => entry.column === name);
		const mapping = asked.mapping.map((entry) => ({
			...entry,
			signal:
				entry.column === 'Compressor Running' ? 'running' : entry.column === 'Pipe A' ? 'evapWaterIn' : 'evapWaterOut',
			unitOfMeasure: entry.column === 'Compressor Running' ? null : 'degC'
		}));
		expect(column('Pipe A')).toBeDefined();
		await confirmMapping(actor, asked.id, { mapping, timeZone: 'Europe/Berlin', choices: { zone: 'Europe/Berlin' } });
		await runReading({ organisationId: actor.organisationId, logId: asked.id });
		const second = await newUnit('Is shared with', { timeZone: 'America/New_York' });
		const known = await upload(second, Buffer.from(rows('03')), 'other.csv');
		expect(known.state, JSON.stringify(known.problems)).toBe('ready');
		const row = await logRowOf(actor, known.id);
		expect(new Set(row.mapping.map((entry) => entry.unitId))).toEqual(new Set([second]));
		// IANA tz: New York is five hours behind UTC on 4 March 2025.
		expect(known.firstAt).toBe('2025-03-04T11:00:00.000Z');
	});

	it('that is broken off in the middle of reading is read again without doubling', async () => {
		const { updateLog } = await import('$lib/server/repositories/logs');
		const { withOrganisation } = await import('$lib/server/repositories/transaction');
		const { runReading } = await import('$lib/server/services/reading');
		const { runAnalysis } = await import('$lib/server/services/analysing');
		const unitId = await newUnit('Again', first);
		const log = await upload(unitId, Buffer.from(first?.csv ?? ''), 'a.csv');
		const before = await startsOf(unitId);
		await withOrganisation(actor.organisationId, (tx) => updateLog(tx, log.id, { state: 'reading' }));
		await runReading({ organisationId: actor.organisationId, logId: log.id });
		await runAnalysis({ organisationId: actor.organisationId, unitId });
		expect(await startsOf(unitId)).toEqual(before);
	});

	it('that is none is refused at once, or after a look, and keeps its bytes', async () => {
		const unitId = await newUnit('Refused');
		const picture = Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex');
		await expect(upload(unitId, picture, 'photo.png')).rejects.toMatchObject({ kind: 'unsupported' });
		const prose = await upload(unitId, Buffer.from('dear reader\nthis is a letter\nand no log\n'), 'letter.txt');
		expect(prose.state).toBe('refused');
		expect(prose.problems[0]?.message).toBeTruthy();
		const { readObject } = await import('$lib/server/store');
		const { logRowOf } = await import('$lib/server/services/logs');
		const row = await logRowOf(actor, prose.id);
		expect(Buffer.from(await readObject(row.files[0]?.key ?? '')).toString()).toContain('dear reader');
	});
});

describe('a correction', () => {
	it('survives recomputation and is shown with its reason', async () => {
		const { correctStart } = await import('$lib/server/services/starts');
		const { runAnalysis } = await import('$lib/server/services/analysing');
		const unitId = await newUnit('Corrected', first);
		await upload(unitId, Buffer.from(first?.csv ?? ''), 'a.csv');
		const [start] = await startsOf(unitId);
		const reason = 'the operator pressed stop';
		const corrected = await correctStart(actor, start?.id ?? '', { outcome: 'called-off', reason }, 'si');
		expect(corrected).toMatchObject({
			id: start?.id,
			outcome: 'called-off',
			trip: null,
			corrected: { reason, by: 'Owner' }
		});
		await runAnalysis({ organisationId: actor.organisationId, unitId });
		expect((await startsOf(unitId))[0]).toMatchObject({ outcome: 'called-off', corrected: { reason } });
	});
});
