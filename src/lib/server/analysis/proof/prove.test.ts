import { expect, it } from 'vitest';
import type { ChangeFact } from '$lib/model/checks';
import { DAY, MINUTE, MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { prove, type ProofInput } from './prove';

const change: ChangeFact = {
	id: 'c1',
	at: MONDAY + 14 * DAY,
	text: 'valve stepper replaced',
	aimedAt: ['valve-underfeeding'],
	newHistory: false
};
/** Every other morning trips before the change (invented), none after. */
const before = Array.from({ length: 14 }, (_, i) =>
	(i % 2 === 0 ? trippedRecord : startRecord)(MONDAY + i * DAY + 6 * 60 * MINUTE, {
		figures: { condWaterInAtStart: 22, waterOutAtStart: 14 }
	})
);
const after = (days: number, water = 22) =>
	Array.from({ length: days }, (_, i) =>
		startRecord(change.at + i * DAY + 6 * 60 * MINUTE, { figures: { condWaterInAtStart: water, waterOutAtStart: 14 } })
	);
const input = (starts: ProofInput['starts']): ProofInput => ({
	starts,
	change,
	changeNumber: 1,
	caseOpenedAt: MONDAY + 10 * DAY,
	otherChanges: [change],
	timeZone: 'UTC',
	until: change.at + 60 * DAY
});

it('takes the trip that opened the case out once (by hand: 7 of 14 become 6 of 13)', () => {
	const proof = prove(input([...before, ...after(3)]));
	expect(proof.before).toMatchObject({ k: 6, m: 13, d: 1, countedK: 7, countedM: 14 });
	expect(proof.before.openingTrip).toBe(before[8]?.startedAt);
	expect(proof.after).toMatchObject({ t: 0, c: 3 });
	expect(proof.state).toBe('not-yet');
	expect(proof.cleanStillNeeded).toBeGreaterThan(0);
	expect(proof.leftOut).toEqual(['water setpoint']);
});

it('is proved only over seven days or more', () => {
	const few = prove(input([...before, ...after(7)]));
	const enough = prove(input([...before, ...after(12)]));
	expect(few.state).toBe('not-yet');
	expect(enough.state).toBe('changed');
	expect(enough.e).toBeGreaterThanOrEqual(40);
});

it('leaves out starts in weather that never failed, with the reason', () => {
	const proof = prove(input([...before, ...after(4, 28)]));
	expect(proof.state).toBe('no-exposed-start');
	expect(proof.sentences).toContain('No exposed start since the change.');
	expect(proof.excluded).toHaveLength(4);
	expect(proof.excluded[0]?.reason).toContain('condenser water');
});

it('says when there is too little before', () => {
	expect(prove(input([...after(20)])).state).toBe('too-little-before');
});

it('says not within this season when the old rate was low', () => {
	const rare = Array.from({ length: 20 }, (_, i) =>
		(i === 9 || i === 16 ? trippedRecord : startRecord)(change.at - (20 - i) * DAY + 6 * 60 * MINUTE)
	);
	const proof = prove(input([...rare, ...after(10)]));
	expect(proof.withinSeason).toBe(false);
	expect(proof.sentences[0]).toContain('Not within this season');
});
