import { beforeAll, expect, it } from 'vitest';
import { METHOD_VERSION } from '$lib/model/circuit-input';
import type { StartRecord } from '$lib/model/start';
import { MONDAY, startRecord } from '../../fixtures/inference/start-record';
import { useFreshDatabase } from './support/fresh';
import { invitedOffice, type Office } from './support/office';

useFreshDatabase();

let office: Office;
beforeAll(async () => {
	office = await invitedOffice('Versions');
});

async function keep(record: StartRecord): Promise<void> {
	const { withOrganisation } = await import('$lib/server/repositories/transaction');
	const { replaceStarts } = await import('$lib/server/repositories/starts');
	const extras = { clues: { si: [], ip: [] }, firstMover: null };
	await withOrganisation(office.organisationId, (tx) =>
		replaceStarts(tx, office.organisationId, office.unitId, [{ record, extras }])
	);
}

/** An invented start as a method version computed it. */
const computed = (methodVersion: string, evapApproach: number): StartRecord => ({
	...startRecord(MONDAY, { figures: { evapApproach } }),
	methodVersion
});

async function previous() {
	const { startsOf } = await import('$lib/server/services/starts');
	const { startSheet } = await import('$lib/server/services/start-sheet');
	const starts = await startsOf(office.engineer, office.unitId, {}, 'si');
	const sheet = await startSheet(office.engineer, starts[0]?.id ?? '', 'si');
	return sheet.previousMethod;
}

it('sets the figures of the version before beside the present ones, and keeps them through later recomputation', async () => {
	await keep(computed('1', 2.5));
	expect(await previous()).toBeNull();
	await keep(computed('2', 3));
	const beside = { methodVersion: '1', told: [], figures: [{ key: 'evapApproach', before: 2.5, now: 3 }] };
	expect(await previous()).toMatchObject(beside);
	await keep(computed('2', 3));
	expect(await previous()).toMatchObject(beside);
});

it('finds the units that an earlier version computed', async () => {
	const { withOrganisation } = await import('$lib/server/repositories/transaction');
	const { saveCircuitResult } = await import('$lib/server/repositories/starts');
	const { ofEarlierMethod } = await import('$lib/server/services/recovery');
	const empty = { verdict: 'cannot-tell' as const, suspects: [], missingSignals: [] };
	const save = (methodVersion: string) =>
		withOrganisation(office.organisationId, (tx) =>
			saveCircuitResult(tx, {
				organisationId: office.organisationId,
				unitId: office.unitId,
				circuit: '1',
				revision: 1,
				covered: [],
				suspects: { si: empty, ip: empty },
				smallestEventSeconds: null,
				alarmShift: null,
				notes: [],
				methodVersion
			})
		);
	const own = async () => (await ofEarlierMethod()).filter((one) => one.unitId === office.unitId);
	await save('0');
	expect(await own()).toEqual([{ organisationId: office.organisationId, unitId: office.unitId }]);
	await save(METHOD_VERSION);
	expect(await own()).toEqual([]);
});
