import { describe, expect, it } from 'vitest';
import type { EventRecord } from '$lib/model/series';
import { activationsOf, latchedAt, namesAnother } from './activations';

const column = (text: string[], spacing = 5) => {
	return { t: Float64Array.from(text, (_, i) => i * spacing * 1000), text };
};
const never = () => false;
const always = () => true;
const texts = (text: string[], started: (from: number, to: number) => boolean = never) =>
	activationsOf(column(text), undefined, [], [], started).map((a) => [a.at / 1000, a.text, a.kind]);

describe('an alarm column', () => {
	it('counts a latched text at its rise only', () => {
		expect(texts(['none', 'none', 'Low evap temp', 'Low evap temp', 'none'])).toEqual([
			[10, 'Low evap temp', 'low-evaporator-saturation']
		]);
	});

	it('takes a text that stands in the first row for risen before the log', () => {
		expect(texts(['Oil flow lost', 'Oil flow lost', ''])).toEqual([]);
	});

	it('makes no new alarm of a blank cell, but one of the same text after another start', () => {
		const cells = ['', 'Oil flow lost', '', 'Oil flow lost'];
		expect(texts(cells)).toHaveLength(1);
		expect(texts(cells, always)).toHaveLength(2);
	});

	it('reads several alarms in a cell, and what joins later', () => {
		expect(texts(['', 'Oil flow lost', 'Oil flow lost; Phase loss'], never).map((a) => a[0])).toEqual([5, 10]);
	});

	it('leaves warnings, notes and clearings out', () => {
		expect(texts(['', 'Low evap temp warning', 'Low evap temp cleared', 'Remote stop', 'OK'])).toEqual([]);
	});

	it('takes codes for trips of unknown kind, zero for none', () => {
		const codes = { t: Float64Array.of(0, 5000, 10_000), v: Float64Array.of(0, 217, 0), logging: 'interval' as const };
		expect(activationsOf(undefined, codes, [], [], never)).toMatchObject([
			{ at: 5000, text: '217', kind: 'unknown', period: 5 }
		]);
	});

	it('tells whether a text stands at an instant', () => {
		const alarm = column(['', 'Oil flow lost', 'Oil flow lost', '']);
		expect([0, 7000, 15_000, 99_000].map((at) => latchedAt(alarm, at))).toEqual([false, true, false, null]);
		expect(latchedAt(undefined, 0)).toBeNull();
	});
});

describe('an alarm history', () => {
	const line = (more: Partial<EventRecord>): EventRecord => {
		return { at: 1000, text: 'High head pressure', severity: 'trip', what: 'activation', source: 'history', ...more };
	};

	it('counts activations of trips and of unknown severity', () => {
		const events = [
			line({}),
			line({ severity: 'unknown' }),
			line({ severity: 'warning' }),
			line({ severity: 'note' }),
			line({ what: 'clearing' })
		];
		expect(activationsOf(undefined, undefined, events, [], never)).toHaveLength(2);
	});

	it('knows a supply failure, and the unit’s own words for a code', () => {
		expect(activationsOf(undefined, undefined, [line({ text: 'Power failure' })], [], never)[0]?.power).toBe(true);
		const own = [{ words: 'A12', kind: 'external-interlock' as const }];
		expect(activationsOf(undefined, undefined, [line({ text: 'stopped', code: 'A12' })], own, never)[0]?.kind).toBe(
			'external-interlock'
		);
	});
});

describe('namesAnother', () => {
	it('leaves the alarms of a sister circuit to it', () => {
		const of = (text: string) => [namesAnother(text, '1'), namesAnother(text, '2')];
		expect(of('Ckt 2 low evap temp')).toEqual([true, false]);
		expect(of('Low oil pressure circuit A')).toEqual([false, true]);
		expect(of('Low oil pressure')).toEqual([false, false]);
	});
});
