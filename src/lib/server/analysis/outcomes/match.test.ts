import { describe, expect, it } from 'vitest';
import type { Activation } from './activations';
import { matchAlarms, proposeShift } from './match';

const alarm = (seconds: number, more: Partial<Activation> = {}): Activation => {
	return { at: seconds * 1000, text: 'x', kind: 'oil-flow', power: false, source: 'history', period: 0, ...more };
};
const stop = (seconds: number, uncertainty = 0) => ({ at: seconds * 1000, uncertainty });
const matched = (stops: ReturnType<typeof stop>[], alarms: Activation[]) =>
	matchAlarms(stops, alarms).map((a) => (a === null ? null : a.at / 1000));

describe('matchAlarms', () => {
	it('holds the window of −30 s to 2 min, wider by the stop’s own uncertainty', () => {
		expect(matched([stop(1000)], [alarm(970)])).toEqual([970]);
		expect(matched([stop(1000)], [alarm(969)])).toEqual([null]);
		expect(matched([stop(1000)], [alarm(1120)])).toEqual([1120]);
		expect(matched([stop(1000)], [alarm(1121)])).toEqual([null]);
		expect(matched([stop(1000, 60)], [alarm(911)])).toEqual([911]);
	});

	it('gives a coarse alarm column two of its periods', () => {
		expect(matched([stop(1000)], [alarm(1600, { period: 300 })])).toEqual([1600]);
		expect(matched([stop(1000)], [alarm(1601, { period: 300 })])).toEqual([null]);
	});

	it('gives one activation to one stop, the nearest', () => {
		expect(matched([stop(1000), stop(1100)], [alarm(1090)])).toEqual([null, 1090]);
	});

	it('prefers a known kind among those within one period of the nearest', () => {
		const found = matchAlarms([stop(1000)], [alarm(1001, { kind: 'unknown' }), alarm(1005), alarm(1100)]);
		expect(found[0]?.at).toBe(1_005_000);
	});
});

describe('proposeShift', () => {
	const stops = [1000, 9000, 20_000, 31_000].map((s) => stop(s));

	it('finds the shift that brings most alarms to a stop, at least three', () => {
		expect(proposeShift(stops, [alarm(400), alarm(8401), alarm(19_400), alarm(50_000)])).toBe(600);
		expect(proposeShift(stops, [alarm(400), alarm(8400)])).toBeNull();
	});

	it('takes the smaller of two shifts that fit alike', () => {
		// Stops in pairs 25 min apart; every alarm lies 5 min after the first of a pair, so −300 s and +1200 s both fit.
		const pairs = [0, 20_000, 40_000, 60_000].flatMap((s) => [stop(s), stop(s + 1500)]);
		expect(
			proposeShift(
				pairs,
				[300, 20_300, 40_300, 60_300].map((s) => alarm(s))
			)
		).toBe(-300);
	});

	it('proposes none where the clocks agree or the shift exceeds two hours', () => {
		expect(proposeShift(stops, [alarm(1001), alarm(9001), alarm(20_001)])).toBeNull();
		expect(
			proposeShift(
				[0, 20_000, 40_000].map((s) => stop(s)),
				[8000, 28_100, 48_200].map((s) => alarm(s))
			)
		).toBeNull();
	});
});
