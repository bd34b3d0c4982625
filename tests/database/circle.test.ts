import { beforeAll, describe, expect, it } from 'vitest';
import type { StartRecord } from '$lib/model/start';
import { changeInputSchema, checkInputSchema } from '$lib/model/wire/field';
import { caseInputSchema } from '$lib/model/wire/case';
import { visitInputSchema } from '$lib/model/wire/visit';
import { startRecord, trippedRecord } from '../../fixtures/inference/start-record';
import { useFreshDatabase } from './support/fresh';
import { invitedOffice, type Office } from './support/office';

// Invented office, readings and starts throughout.
useFreshDatabase();

let office: Office;
const DAY = 86_400_000;
/** Six in the morning, UTC, some days ago. */
const morning = (daysAgo: number): number => {
	const day = Math.floor(Date.now() / DAY) - daysAgo;
	return day * DAY + 6 * 3_600_000;
};

beforeAll(async () => {
	office = await invitedOffice();
});

async function keepStarts(records: StartRecord[]): Promise<void> {
	const { withOrganisation } = await import('$lib/server/repositories/transaction');
	const { replaceStarts } = await import('$lib/server/repositories/starts');
	await withOrganisation(office.organisationId, (tx) =>
		replaceStarts(
			tx,
			office.organisationId,
			office.unitId,
			records.map((record) => ({ record, extras: { clues: { si: [], ip: [] }, firstMover: null } }))
		)
	);
}

const oil = (more: object = {}) =>
	checkInputSchema.parse({
		kind: 'oil-level',
		readings: { heightMm: 60, minutesRun: 5, minutesOff: 2, equalised: true },
		...more
	});

describe('field checks', () => {
	it('are kept once per client key, as found, with the reason why they are indicative', async () => {
		const { checksOf, recordCheck } = await import('$lib/server/services/checks');
		const first = await recordCheck(office.technician, office.unitId, oil({ clientKey: 'phone-0001' }), 'si');
		const again = await recordCheck(office.technician, office.unitId, oil({ clientKey: 'phone-0001' }), 'si');
		expect(first.repeated).toBe(false);
		expect(again).toMatchObject({ repeated: true, check: { id: first.check.id } });
		expect(first.check).toMatchObject({
			result: 'outside',
			indicative: true,
			indicativeReason: 'it ran 5 min before, not about 30; it was off 2 min, not 5',
			readings: { lowMm: 100, highMm: 220 }
		});
		expect(await checksOf(office.engineer, office.unitId, 'ip')).toHaveLength(1);
	});

	it('become facts of the analysis: half a clue, unsigned', async () => {
		const { factsOf } = await import('$lib/server/services/facts');
		const { withOrganisation } = await import('$lib/server/repositories/transaction');
		const facts = await withOrganisation(office.organisationId, (tx) => factsOf(tx, office.unitId));
		expect(facts('1').checks).toMatchObject([{ kind: 'oil-level', heightMm: 60, indicative: true, signed: false }]);
	});

	it('leave a flow out that the unit has no curve for', async () => {
		const { recordCheck } = await import('$lib/server/services/checks');
		const { factsOf } = await import('$lib/server/services/facts');
		const { withOrganisation } = await import('$lib/server/repositories/transaction');
		const flow = checkInputSchema.parse({ kind: 'water-flow', readings: { side: 'evaporator', drop: 30 } });
		const { check } = await recordCheck(office.technician, office.unitId, flow, 'si');
		expect(check.result).toBe('cannot-tell');
		const facts = await withOrganisation(office.organisationId, (tx) => factsOf(tx, office.unitId));
		expect(facts('1').checks.map((fact) => fact.kind)).toEqual(['oil-level']);
	});

	it('are refused without flow and drop, from the future, for a circuit that is not there, and from a client', async () => {
		const { recordCheck } = await import('$lib/server/services/checks');
		expect(checkInputSchema.safeParse({ kind: 'water-flow', readings: { side: 'evaporator' } }).success).toBe(false);
		const future = oil({ at: new Date(Date.now() + DAY).toISOString() });
		await expect(recordCheck(office.technician, office.unitId, future, 'si')).rejects.toMatchObject({
			kind: 'invalid'
		});
		const third = oil({ circuit: '3' });
		await expect(recordCheck(office.technician, office.unitId, third, 'si')).rejects.toMatchObject({ kind: 'invalid' });
		await expect(recordCheck(office.client, office.unitId, oil(), 'si')).rejects.toMatchObject({ kind: 'forbidden' });
	});

	it('are seen by a client once a technician has signed, and are signed once', async () => {
		const { checksOf, recordCheck, signCheck } = await import('$lib/server/services/checks');
		const input = oil({
			suspect: 'low-oil',
			readings: { heightMm: 60, minutesRun: 40, minutesOff: 9, equalised: true }
		});
		const { check } = await recordCheck(office.technician, office.unitId, input, 'si');
		expect(check.indicative).toBe(false);
		expect(await checksOf(office.client, office.unitId, 'si')).toEqual([]);
		await expect(signCheck(office.manager, check.id, undefined, 'si')).rejects.toMatchObject({ kind: 'forbidden' });
		const signed = await signCheck(office.technician, check.id, undefined, 'si');
		expect(signed).toMatchObject({ signedBy: 'technician', suspect: 'low-oil' });
		await expect(signCheck(office.engineer, check.id, undefined, 'si')).rejects.toMatchObject({ kind: 'conflict' });
		expect((await checksOf(office.client, office.unitId, 'si')).map(({ id }) => id)).toEqual([check.id]);
	});
});

describe('photos', () => {
	it('keep the original byte for byte and show a smaller view without hidden data; sent twice, kept once', async () => {
		const sharp = (await import('sharp')).default;
		const { addPhoto, photoObject } = await import('$lib/server/services/photos');
		const { readObject } = await import('$lib/server/store');
		const bytes = await sharp({ create: { width: 2400, height: 1200, channels: 3, background: '#335' } })
			.withMetadata({ orientation: 6 })
			.jpeg()
			.toBuffer();
		const input = {
			clientKey: 'photo-0001',
			checkId: null,
			checkKey: 'phone-0001',
			caption: 'sight glass',
			kind: 'sight-glass' as const
		};
		const { photo } = await addPhoto(office.technician, office.unitId, bytes, input);
		expect(photo).toMatchObject({ width: 800, height: 1600, bytes: bytes.length, kind: 'sight-glass' });
		expect(photo.checkId).not.toBeNull();
		const original = await photoObject(office.engineer, photo.id, 'original');
		expect(original.type).toBe('image/jpeg');
		expect(Buffer.from(await readObject(original.key)).equals(bytes)).toBe(true);
		const view = await photoObject(office.engineer, photo.id, 'view');
		expect((await sharp(await readObject(view.key)).metadata()).exif).toBeUndefined();
		expect(await addPhoto(office.technician, office.unitId, bytes, input)).toMatchObject({
			repeated: true,
			photo: { id: photo.id }
		});
		await expect(photoObject(office.client, photo.id, 'view')).rejects.toMatchObject({ kind: 'not-found' });
	});

	it('refuse what is no picture', async () => {
		const { addPhoto } = await import('$lib/server/services/photos');
		const input = { clientKey: null, checkId: null, checkKey: null, caption: '', kind: 'camera' as const };
		const text = new TextEncoder().encode('time,value\n');
		await expect(addPhoto(office.technician, office.unitId, text, input)).rejects.toMatchObject({
			kind: 'unsupported'
		});
	});
});

describe('changes', () => {
	it('keep a running balance of oil, and ask who handled the refrigerant', async () => {
		const { changesOf, recordChange } = await import('$lib/server/services/changes');
		const change = (fields: object) => changeInputSchema.parse({ text: 'invented', ...fields });
		await recordChange(office.technician, office.unitId, change({ kind: 'oil', amount: 4.5, clientKey: 'change-01' }));
		await recordChange(office.technician, office.unitId, change({ kind: 'oil', amount: 4.5, clientKey: 'change-01' }));
		await recordChange(office.technician, office.unitId, change({ kind: 'oil', amount: -1 }));
		expect((await changesOf(office.client, office.unitId)).oil).toEqual({
			unit: 'L',
			added: 4.5,
			removed: 1,
			net: 3.5,
			times: 2
		});
		const bare = changeInputSchema.safeParse({ kind: 'refrigerant', text: 'added', amount: 2 });
		expect(bare.error?.issues.map((issue) => issue.path.join('.'))).toEqual(['certifiedPerson']);
	});
});

describe('a case', () => {
	const call = (more: object = {}) =>
		caseInputSchema.parse({ unitId: office.unitId, complaint: 'Goes out as soon as we start it', ...more });

	it('goes from the call over visit and change to a reopening by itself when its kind of trip comes back', async () => {
		const { caseOf, changeCase, openCase } = await import('$lib/server/services/cases');
		const { planVisit, visitOf, changeVisit } = await import('$lib/server/services/visits');
		const { recordChange } = await import('$lib/server/services/changes');
		const { followCases } = await import('$lib/server/services/case-following');
		const before = [9, 8, 7, 6].map((day) => trippedRecord(morning(day)));
		await keepStarts(before);
		const opened = await openCase(office.manager, call({ circuit: '1' }), 'si');
		expect(opened).toMatchObject({ number: 'C-1', state: 'open', proof: null });

		const visit = await planVisit(
			office.manager,
			visitInputSchema.parse({
				unitId: office.unitId,
				date: new Date(Date.now() + DAY).toISOString().slice(0, 10),
				technicianId: office.technician.personId
			})
		);
		expect(visit).toMatchObject({ caseId: opened.id, caseNumber: 'C-1' });
		expect((await caseOf(office.manager, opened.id, 'si')).state).toBe('visit planned');

		const at = new Date(morning(5)).toISOString();
		await recordChange(
			office.technician,
			office.unitId,
			changeInputSchema.parse({ kind: 'valve', text: 'Valve replaced', at })
		);
		const changed = await caseOf(office.manager, opened.id, 'si');
		expect(changed.state).toBe('changed');
		expect(changed.proof?.state).toBe('no-exposed-start');

		await expect(changeCase(office.manager, opened.id, { state: 'closed' }, 'si')).rejects.toMatchObject({
			errors: [{ field: 'closeReason' }]
		});
		await expect(
			changeCase(office.technician, opened.id, { state: 'closed', closeReason: 'done' }, 'si')
		).rejects.toMatchObject({ kind: 'forbidden' });

		await keepStarts([...before, startRecord(morning(4)), trippedRecord(morning(3), { circuit: '2' })]);
		expect(await followCases({ organisationId: office.organisationId, unitId: office.unitId })).toEqual([]);
		await keepStarts([...before, startRecord(morning(4)), trippedRecord(morning(3), {}, 'high-condensing')]);
		expect(await followCases({ organisationId: office.organisationId, unitId: office.unitId })).toEqual([]);
		await keepStarts([...before, startRecord(morning(4)), trippedRecord(morning(2))]);
		const news = await followCases({ organisationId: office.organisationId, unitId: office.unitId });
		expect(news).toMatchObject([{ kind: 'reopened', caseId: opened.id }]);
		const reopened = await caseOf(office.client, opened.id, 'si');
		expect(reopened.state).toBe('reopened');
		expect(reopened.timeline.map((entry) => entry.kind)).toEqual(['change', 'opened', 'visit', 'reopened']);
		expect(await followCases({ organisationId: office.organisationId, unitId: office.unitId })).toEqual([]);

		const done = await changeVisit(office.technician, visit.id, {
			arrivedAt: new Date(morning(1)).toISOString(),
			leftAt: new Date(morning(1) + 3_600_000).toISOString(),
			result: 'Found the valve sticking.'
		});
		expect(done.result).toBe('Found the valve sticking.');
		expect((await visitOf(office.client, visit.id)).leftAt).not.toBeNull();
	});

	it('is proved by itself, and may then be closed without a reason', async () => {
		const { caseOf, changeCase, openCase } = await import('$lib/server/services/cases');
		const { recordChange } = await import('$lib/server/services/changes');
		const { followCases } = await import('$lib/server/services/case-following');
		const before = Array.from({ length: 12 }, (_, i) => trippedRecord(morning(34 - i)));
		const after = Array.from({ length: 20 }, (_, i) => startRecord(morning(20 - i)));
		await keepStarts([...before, ...after]);
		const opened = await openCase(office.engineer, call({ circuit: '1' }), 'si');
		const at = new Date(morning(21)).toISOString();
		const input = { kind: 'solenoid', text: 'Solenoid replaced', at, caseId: opened.id };
		await recordChange(office.technician, office.unitId, changeInputSchema.parse(input));
		const news = await followCases({ organisationId: office.organisationId, unitId: office.unitId });
		expect(news).toMatchObject([{ kind: 'proved', caseId: opened.id }]);
		const closed = await changeCase(office.engineer, opened.id, { state: 'closed' }, 'si');
		expect(closed).toMatchObject({ state: 'closed', closeReason: 'proved by the starts since the change' });
		await keepStarts([...before, ...after, trippedRecord(morning(0))]);
		expect(await followCases({ organisationId: office.organisationId, unitId: office.unitId })).toMatchObject([
			{ kind: 'reopened' }
		]);
		expect((await caseOf(office.engineer, opened.id, 'si')).state).toBe('reopened');
	});

	it('is not known to a client of another site, and its suggestions are not for clients', async () => {
		const { caseOf, casesOf, openCase } = await import('$lib/server/services/cases');
		const { caseSuggestions } = await import('$lib/server/services/case-suggestions');
		const opened = await openCase(office.engineer, call(), 'si');
		const elsewhere = { ...office.client, siteIds: [office.otherSiteId] };
		await expect(caseOf(elsewhere, opened.id, 'si')).rejects.toMatchObject({ kind: 'not-found' });
		expect(await casesOf(elsewhere, {})).toEqual([]);
		await expect(openCase(office.client, call(), 'si')).rejects.toMatchObject({ kind: 'forbidden' });
		await expect(caseSuggestions(office.client)).rejects.toMatchObject({ kind: 'forbidden' });
	});
});

describe('case suggestions', () => {
	it('name a unit whose latest start-up trips repeat and that has no open case', async () => {
		const { caseSuggestions } = await import('$lib/server/services/case-suggestions');
		const { changeCase, casesOf } = await import('$lib/server/services/cases');
		await keepStarts([trippedRecord(morning(2)), startRecord(morning(1)), trippedRecord(morning(0))]);
		expect(await caseSuggestions(office.manager)).toEqual([]);
		for (const { id, state } of await casesOf(office.manager, {}))
			if (state !== 'closed') await changeCase(office.manager, id, { state: 'closed', closeReason: 'test over' }, 'si');
		expect(await caseSuggestions(office.manager)).toMatchObject([
			{ unitTag: 'U 1', circuit: '1', text: 'Start-up trip on low evaporator saturation, 2 in 14 days' }
		]);
	});
});

describe('the calendar file', () => {
	it('has the site’s clock in UTC, escaped text and folded lines', async () => {
		const { calendarOf } = await import('$lib/server/services/calendar');
		const { planVisit } = await import('$lib/server/services/visits');
		const visit = await planVisit(
			office.manager,
			visitInputSchema.parse({
				unitId: office.unitId,
				date: '2027-01-11',
				beThereBy: '05:40',
				purpose: 'Read the level, the filter; and the valve at rest, all of it before the first start of the day'
			})
		);
		const file = calendarOf(visit, null, 'https://firstpull.test/visits/1');
		// Berlin is an hour ahead of UTC in January.
		expect(file).toContain('DTSTART:20270111T044000Z\r\n');
		expect(file).toContain('Read the level\\, the filter\\; and');
		expect(Math.max(...file.split('\r\n').map((line) => Buffer.byteLength(line)))).toBeLessThanOrEqual(75);
	});
});
