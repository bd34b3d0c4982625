import { Readable } from 'node:stream';
import { beforeAll, describe, expect, it } from 'vitest';
import { notedInputSchema, type NotedInputSent } from '$lib/model/wire/noted';
import { useFreshDatabase } from './support/fresh';
import { invitedOffice, type Office } from './support/office';

useFreshDatabase();

let office: Office;
beforeAll(async () => {
	office = await invitedOffice('Record');
});

/** Invented: a Tuesday in a cool week, Berlin clock one hour ahead of UTC. */
const LIST = `Time,Alarm,State
2025-03-04 06:02:10,Low oil flow trip,active
2025-03-04 06:40:00,Low oil flow trip,cleared
2025-03-05 06:01:30,Circuit 2 high condenser pressure trip,active
2025-03-06 06:05:00,Low water flow warning,warning
`;

async function uploaded(text: string, name: string) {
	const { receiveFile } = await import('$lib/server/services/incoming');
	const { logRowOf, takeLog } = await import('$lib/server/services/logs');
	const { runReading } = await import('$lib/server/services/reading');
	const file = await receiveFile(Readable.from([Buffer.from(text)]), name);
	const options = { timeZone: null, mapping: 'auto' as const, name: null };
	const { id } = await takeLog(office.engineer, office.unitId, [file], options);
	await runReading({ organisationId: office.organisationId, logId: id });
	await analysed();
	return logRowOf(office.engineer, id);
}
async function analysed() {
	const { runAnalysis } = await import('$lib/server/services/analysing');
	await runAnalysis({ organisationId: office.organisationId, unitId: office.unitId });
}
async function type(input: NotedInputSent) {
	const { recordNoted } = await import('$lib/server/services/noted');
	const answer = await recordNoted(office.technician, office.unitId, notedInputSchema.parse(input));
	await analysed();
	return answer;
}
const record = async () => (await import('$lib/server/services/noted')).recordOf(office.client, office.unitId, 'si');
const starts = async (source: 'log' | 'all') =>
	(await import('$lib/server/services/starts')).startsOf(office.client, office.unitId, { source }, 'si');

describe('a unit without a trend log', () => {
	it('has the trips of its alarm list on record, and none among the starts of logs', async () => {
		const log = await uploaded(LIST, 'alarms.csv');
		expect(log.state, JSON.stringify(log.problems)).toBe('ready');
		const { starts: noted } = await record();
		expect(noted.map((start) => [start.startedAt, start.circuit, start.source, start.trip?.kind])).toEqual([
			['2025-03-04T05:02:10.000Z', '1', 'alarm-list', 'oil-flow'],
			['2025-03-05T05:01:30.000Z', '2', 'alarm-list', 'high-condensing']
		]);
		expect(await starts('log')).toEqual([]);
	});

	it('shows them on the days, in outline, and counts them in no rate', async () => {
		const { daysOf } = await import('$lib/server/services/days');
		const { unitSummaries } = await import('$lib/server/services/summaries');
		const days = await daysOf(office.client, office.unitId, {}, 'si');
		expect(days.days.flatMap((day) => day.strokes.map((stroke) => [day.date, stroke.noted]))).toEqual([
			['2025-03-04', true],
			['2025-03-05', true]
		]);
		expect(days.title).toMatch(/No trend log; 2 of 2/);
		const row = (await unitSummaries(office.owner)).units.find(({ unit }) => unit.id === office.unitId);
		expect(row).toMatchObject({ noted: 2, starts: 0, startupTrips: 0, firstTries: { m: 0, k: 0 } });
	});

	it('takes a typed start with its readings, once', async () => {
		const input: NotedInputSent = {
			kind: 'start',
			clientKey: 'typed-start-1',
			circuit: '1',
			startedAt: '2025-03-07T05:00:00Z',
			endedAt: '2025-03-07T05:02:00Z',
			outcome: 'tripped',
			text: 'low evaporator saturation',
			readings: [{ signal: 'evapPressure', value: 250, moment: 'at-stop' }]
		};
		const { id } = await type(input);
		expect(await type(input)).toEqual({ id, repeated: true });
		const { entries, starts: noted } = await record();
		expect(entries).toHaveLength(1);
		expect(entries[0]).toMatchObject({ id, by: 'technician', covered: false, loggedStart: null });
		expect(entries[0]?.readings).toEqual([{ signal: 'evapPressure', value: 250, unit: 'kPa', moment: 'at-stop' }]);
		expect(noted.at(-1)).toMatchObject({
			source: 'typed',
			startupTrip: true,
			trip: { kind: 'low-evaporator-saturation', basis: 'recorded' }
		});
	});

	it('tells what the counters say between two readings', async () => {
		await type({ kind: 'counters', at: '2025-03-03T06:00:00Z', starts: 4100, runHours: 2000 });
		await type({ kind: 'counters', at: '2025-03-05T06:00:00Z', starts: 4112, runHours: 2003 });
		// Worked by hand: 180 min over 12 starts; at most ⌊180 / 20⌋ = 9 whole windows, and one that goes on.
		expect((await record()).stretches).toEqual([
			expect.objectContaining({ starts: 12, runSeconds: 10_800, meanRunSeconds: 900, shortAtLeast: 2 })
		]);
	});

	it('gives way to a trend log that covers the time, and comes back when the log is removed', async () => {
		const { removeLog } = await import('$lib/server/services/logs');
		const rows = ['Time,Circuit 1 Running,Leaving Water (°C)'];
		for (let minute = 0; minute < 240; minute++) {
			const clock = `${String(5 + Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;
			rows.push(`2025-03-07 ${clock}:00,${minute >= 61 && minute < 64 ? 1 : 0},9.1`);
		}
		const log = await uploaded(rows.join('\n'), 'trend.csv');
		expect(log.state, JSON.stringify(log.problems)).toBe('ready');
		const [start] = await starts('log');
		const during = await record();
		expect(during.entries.at(0)).toMatchObject({ covered: true, loggedStart: start?.id });
		expect(during.starts.map((one) => one.source)).toEqual(['alarm-list', 'alarm-list']);
		await removeLog(office.engineer, log.id);
		await analysed();
		expect((await record()).starts.at(-1)?.source).toBe('typed');
	});

	it('refuses what cannot be, and lets a client type nothing', async () => {
		const { recordNoted, removeNoted } = await import('$lib/server/services/noted');
		const early = {
			kind: 'start',
			outcome: 'held',
			startedAt: '2025-03-07T05:00:00Z',
			endedAt: '2025-03-07T04:00:00Z'
		};
		expect(notedInputSchema.safeParse(early).error?.issues[0]?.path).toEqual(['endedAt']);
		expect(notedInputSchema.safeParse({ kind: 'start', outcome: 'held' }).success).toBe(false);
		const input = notedInputSchema.parse({ kind: 'counters', at: '2025-03-07T05:00:00Z', starts: 3 });
		await expect(recordNoted(office.client, office.unitId, input)).rejects.toMatchObject({ kind: 'forbidden' });
		const third = notedInputSchema.parse({ kind: 'counters', at: '2025-03-07T05:00:00Z', starts: 3, circuit: '3' });
		await expect(recordNoted(office.technician, office.unitId, third)).rejects.toMatchObject({ kind: 'invalid' });
		for (const entry of (await record()).entries) await removeNoted(office.technician, office.unitId, entry.id);
		expect((await record()).entries).toEqual([]);
	});
});

describe('the trip-word table', () => {
	it('is extended by a person for every unit or for one, and trips are told anew', async () => {
		const { addTripWord, removeTripWord, tripWordsOf } = await import('$lib/server/services/trip-words');
		const { tripWordInputSchema } = await import('$lib/model/wire/trip-word');
		await uploaded('Time,Alarm\n2025-03-20 06:02:10,Kode 4711 trip\n2025-03-21 06:00:00,Kode 4711 trip\n', 'codes.csv');
		const kinds = async () =>
			(await record()).starts.filter((start) => start.startedAt > '2025-03-19').map((start) => start.trip?.kind);
		expect(await kinds()).toEqual(['unknown', 'unknown']);
		expect((await tripWordsOf(office.client, office.unitId)).unnamed).toEqual([{ text: 'Kode 4711 trip', times: 2 }]);

		const input = tripWordInputSchema.parse({ words: 'kode 4711', kind: 'oil-flow' });
		await expect(addTripWord(office.technician, office.unitId, input)).rejects.toMatchObject({ kind: 'forbidden' });
		const all = await addTripWord(office.engineer, office.unitId, input);
		await expect(addTripWord(office.engineer, office.unitId, input)).rejects.toMatchObject({ kind: 'conflict' });
		await analysed();
		expect(await kinds()).toEqual(['oil-flow', 'oil-flow']);

		// A unit's own words come before those of every unit.
		await addTripWord(office.engineer, office.unitId, { ...input, kind: 'motor-temperature', unitId: office.unitId });
		await analysed();
		expect(await kinds()).toEqual(['motor-temperature', 'motor-temperature']);
		for (const word of (await tripWordsOf(office.client, office.unitId)).words)
			await removeTripWord(office.engineer, office.unitId, word.id);
		await analysed();
		expect(await kinds()).toEqual(['unknown', 'unknown']);
		expect(all.unitId).toBeNull();
	});
});
