import { describe, expect, it } from 'vitest';
import type { CircuitInput } from '$lib/model/circuit-input';
import { inventedInput, inventedLog, MIDNIGHT } from '../testing/synthetic-log';
import { edgeNotes, isAttended, othersRunningAt, readRest } from './rests';
import type { Run } from './runs';

const HOUR = 3600;
const at = (hours: number) => MIDNIGHT + hours * HOUR * 1000;
const sister = inventedLog([{ start: 2 * HOUR, stop: 5 * HOUR }], 60, 0, 24 * HOUR).running;
if (sister === undefined) throw new Error('no running');
const input = (more: Partial<CircuitInput> = {}) =>
	inventedInput({}, { others: [{ name: '2', sameUnit: true, running: sister }], ...more });
const run = (startedAt: number, restFrom: number | null): Run => {
	return {
		startedAt,
		startUncertainty: 60,
		observed: true,
		endedAt: null,
		lastOn: startedAt,
		endUncertainty: 0,
		end: 'log-end',
		holes: [],
		restFrom,
		restAtLeast: false
	};
};

describe('readRest', () => {
	it('tells the circuit’s first start from the unit’s', () => {
		// Off since midnight; the sister ran from 2 to 5 h.
		expect(readRest(input(), run(at(8), at(0)), 6 * HOUR)).toMatchObject({
			firstStart: true,
			circuitFirst: true,
			unitFirst: false,
			restSeconds: 8 * HOUR
		});
		expect(readRest(input(), run(at(12), at(0)), 6 * HOUR).unitFirst).toBe(true);
		expect(readRest(input(), run(at(5.9), at(0)), 6 * HOUR).firstStart).toBe(false);
		expect(readRest(input(), run(at(6), at(0)), 6 * HOUR).firstStart).toBe(true);
	});

	it('knows a lay-up, and a rest of which nothing is known', () => {
		expect(readRest(input(), run(at(200), at(0)), 6 * HOUR).layUp).toBe(true);
		expect(readRest(input(), run(at(8), null), 6 * HOUR)).toMatchObject({
			restSeconds: null,
			restAtLeast: false,
			firstStart: false
		});
	});
});

describe('who else, and who is there', () => {
	it('counts what runs at an instant', () => {
		expect(othersRunningAt(input(), at(3))).toBe(1);
		expect(othersRunningAt(input(), at(5))).toBe(0);
	});

	it('is attended during a visit and in manual or test mode', () => {
		const visits = [{ from: at(9), to: at(10) }];
		expect(isAttended(input({ visits }), at(9.5))).toBe(true);
		expect(isAttended(input({ visits }), at(10.1))).toBe(false);
		const unitMode = { t: Float64Array.of(at(0), at(9), at(10)), text: ['Auto', 'Manual test', 'Auto'] };
		expect([at(8), at(9.5), at(11)].map((t) => isAttended(input({ texts: { unitMode } }), t))).toEqual([
			false,
			true,
			false
		]);
	});

	it('notes a command more than 30 s before the status', () => {
		const series = inventedLog([], 5, 0, HOUR, { startCommand: (s) => (s >= 1000 ? 1 : 0) });
		const note = (s: number) => edgeNotes(inventedInput(series), run(MIDNIGHT + s * 1000, null));
		expect(note(1025)).toEqual([]);
		expect(note(1120)).toEqual(['The start command came 120 s before the compressor ran.']);
	});
});
