import { describe, expect, it } from 'vitest';
import type { Envelope } from '$lib/model/wire/comparison';
import { envelopePanel, inOrder, landmarkRows, shiftScale } from './envelope-panel';

/** Invented medians of a group, 10 s apart from −20 s on. */
const side = (until: number, level: number, wholeUntil: number | null): Envelope['a'] => {
	const t = Array.from({ length: until / 10 + 3 }, (_, k) => -20 + 10 * k);
	return {
		count: 6,
		t,
		median: t.map(() => level),
		low: t.map(() => level - 1),
		high: t.map(() => level + 1),
		wholeUntil
	};
};
const envelope: Envelope = {
	signal: 'lift',
	label: 'lift',
	quantity: 'temperatureDifference',
	family: 'high',
	a: side(90, 5, 80),
	b: side(120, 12, null)
};

describe('envelopePanel', () => {
	it('letters both groups, and leaves paper where one is no longer whole', () => {
		const drawn = envelopePanel(envelope, null, 300, 120);
		expect(drawn?.panel.xDomain).toEqual([-20, 96]);
		expect(drawn?.panel.bareFrom).toEqual({ x: 80, words: 'A no longer whole' });
		expect(drawn?.labels.map(({ key }) => key).sort()).toEqual(['A', 'B']);
		expect(drawn?.panel.xTicks.map(({ label }) => label)).toEqual(['0', '30', '45', '60', '90']);
	});
	it('is nothing without points', () => {
		const bare = { count: 0, t: [], median: [], low: [], high: [], wholeUntil: null };
		expect(envelopePanel({ ...envelope, a: bare, b: bare }, null, 300, 120)).toBeNull();
	});
});

describe('shiftScale', () => {
	it('keeps no shift in the middle and the widest end inside', () => {
		const x = shiftScale({ shift: -2, low: -4, high: 1 }, 110);
		expect(x?.(0)).toBe(55);
		expect(x?.(-4)).toBe(5);
		expect(shiftScale({ shift: 0, low: null, high: null }, 110)).toBeNull();
	});
});

describe('landmarkRows', () => {
	it('names each signal once, and none that was never read', () => {
		const row = (signal: string, a: number | null) => ({
			signal,
			label: signal,
			quantity: 'percent',
			described: false,
			a,
			b: null
		});
		const mark = (seconds: number, rows: ReturnType<typeof row>[]) => ({ seconds, countA: 3, countB: 3, rows });
		const rows = landmarkRows([
			mark(30, [row('lift', null), row('capacity', 4)]),
			mark(60, [row('capacity', 5), row('margin', null)])
		]);
		expect(rows.map(({ signal }) => signal)).toEqual(['capacity']);
	});
});

describe('inOrder', () => {
	it('puts the telling signals first', () => {
		const order = inOrder([{ ...envelope, signal: 'demand' }, { ...envelope, signal: 'capacity' }, envelope]);
		expect(order.map(({ signal }) => signal)).toEqual(['lift', 'capacity', 'demand']);
	});
});
