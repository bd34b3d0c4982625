import { describe, expect, it } from 'vitest';
import { counterStretches, type CounterReading } from './counters';

const HOUR = 3_600_000;
const reading = (hour: number, starts: number | null, runHours: number | null): CounterReading => ({
	circuit: '1',
	at: hour * HOUR,
	starts,
	runHours,
	basis: 'typed'
});

describe('counterStretches', () => {
	// Worked by hand: 9 starts in 1.5 h are 10 min each; at most ⌊90 / 20⌋ = 4 and one that goes on lasted 20 min.
	it('tells the mean run and how many were short at least', () => {
		const [stretch, ...rest] = counterStretches([reading(24, 209, 1001.5), reading(0, 200, 1000)], 1200);
		expect(rest).toEqual([]);
		expect(stretch).toMatchObject({ from: 0, to: 24 * HOUR, starts: 9, runSeconds: 5400, meanRunSeconds: 600 });
		expect(stretch?.shortAtLeast).toBe(4);
	});
	it('says nothing where a counter was not read or went back', () => {
		const stretches = counterStretches([reading(0, 10, null), reading(1, 12, 5), reading(2, 3, 6)], 1200);
		expect(stretches[0]).toMatchObject({ starts: 2, runSeconds: null, meanRunSeconds: null, shortAtLeast: null });
		expect(stretches[1]).toMatchObject({ starts: null, runSeconds: null, wentBack: true });
	});
	it('keeps circuits apart', () => {
		const other = { ...reading(1, 500, 90), circuit: '2' };
		expect(counterStretches([reading(0, 10, 1), other, reading(2, 11, 2)], 1200)).toHaveLength(1);
	});
	it('finds no short run where the time would do for all', () => {
		expect(counterStretches([reading(0, 0, 0), reading(10, 3, 8)], 1200)[0]?.shortAtLeast).toBe(0);
	});
});
