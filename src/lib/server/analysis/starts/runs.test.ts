import { describe, expect, it } from 'vitest';
import { findRuns, type RunQuestions } from './runs';
import type { RunningReadings } from './running';

/** Readings from a picture: 1 on, 0 off, a dot no row; one character every `spacing` s. */
function readings(picture: string, spacing: number, logging: 'interval' | 'change' = 'interval'): RunningReadings {
	const rows = [...picture].flatMap((c, i) => (c === '.' ? [] : [{ t: i * spacing * 1000, on: c === '1' ? 1 : 0 }]));
	const t = Float64Array.from(rows, (r) => r.t);
	const on = Uint8Array.from(rows, (r) => r.on);
	return { t, on, interrupted: new Uint8Array(rows.length), logging, source: 'running', notes: [] };
}

const one: RunQuestions = { sameRunAcross: () => true, tripRecordedIn: () => false };
const seen = (picture: string, spacing: number, questions = one) =>
	findRuns(readings(picture, spacing), questions).map((r) => [
		r.observed,
		r.startedAt / 1000,
		r.endedAt === null ? null : r.endedAt / 1000,
		r.end
	]);

describe('findRuns', () => {
	it('opens a start only after a seen off', () => {
		expect(seen('1100110', 30)).toEqual([
			[false, 0, 60, 'off'],
			[true, 120, 180, 'off']
		]);
		expect(seen('0011', 30)).toEqual([[true, 60, null, 'log-end']]);
	});

	it('bridges an off under 20 s unless a trip is recorded in it', () => {
		expect(seen('0'.repeat(4) + '111100011110', 5)).toHaveLength(1);
		expect(seen('0'.repeat(4) + '1111000011110', 5)).toHaveLength(2);
		expect(seen('0'.repeat(4) + '111100011110', 5, { ...one, tripRecordedIn: () => true })).toHaveLength(2);
		expect(seen('0110110', 20)).toHaveLength(2);
	});

	it('makes a hole of a gap inside a run, or loses the run at it', () => {
		const picture = '000' + '1'.repeat(8) + '.'.repeat(20) + '1'.repeat(8) + '00';
		const [run] = findRuns(readings(picture, 30), one);
		expect(run?.holes).toEqual([{ from: 300_000, to: 930_000 }]);
		expect(run?.endedAt).toBe(39 * 30_000);
		expect(seen(picture, 30, { ...one, sameRunAcross: () => false })).toEqual([
			[true, 90, 300, 'gap-on'],
			[false, 930, 1170, 'off']
		]);
	});

	it('ends a run in a gap at the first off reading, told as such', () => {
		expect(seen('000' + '1'.repeat(8) + '.'.repeat(20) + '0000', 30)).toEqual([[true, 90, 930, 'gap-off']]);
	});

	it('takes a start hidden in a short gap with its uncertainty, in a long one not', () => {
		const short = findRuns(readings('0'.repeat(8) + '....' + '1'.repeat(8), 30), one)[0];
		expect([short?.observed, short?.startUncertainty, short?.restAtLeast]).toEqual([true, 150, true]);
		expect(findRuns(readings('0'.repeat(8) + '.'.repeat(12) + '1'.repeat(8), 30), one)[0]?.observed).toBe(false);
	});

	it('knows where the rest before began', () => {
		const runs = findRuns(readings('0110001110', 60), one);
		expect(runs.map((r) => [r.restFrom, r.restAtLeast])).toEqual([
			[0, true],
			[180_000, false]
		]);
	});

	it('knows a change-of-value edge to a second, and no gap in it', () => {
		const runs = findRuns(readings('0' + '.'.repeat(500) + '1' + '.'.repeat(500) + '0', 30, 'change'), one);
		expect(runs).toHaveLength(1);
		expect([runs[0]?.startUncertainty, runs[0]?.endUncertainty, runs[0]?.observed]).toEqual([1, 1, true]);
	});
});
