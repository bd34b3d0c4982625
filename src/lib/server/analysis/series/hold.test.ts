import { describe, expect, it } from 'vitest';
import type { Series } from '$lib/model/series';
import { expandHeld, holdInstants, valueInForce } from './hold';

const change = (seconds: number[], v: number[]): Series => {
	return { t: Float64Array.from(seconds, (s) => s * 1000), v: Float64Array.from(v), logging: 'change' };
};

describe('change-of-value records', () => {
	const temperature = change([0, 600], [12, 9]);
	const pump = change([0, 600, 7200], [1, 0, NaN]);

	it('hold analogue values 15 min and states to the next record', () => {
		expect(valueInForce('evapWaterOut', temperature, 599_000, 60)).toBe(12);
		expect(valueInForce('evapWaterOut', temperature, 1_500_000, 60)).toBe(9);
		expect(valueInForce('evapWaterOut', temperature, 1_500_001, 60)).toBeNaN();
		expect(valueInForce('evapPumpRun', pump, 7_199_000, 60)).toBe(0);
		// A blank record is an interruption: nothing is known after it.
		expect(valueInForce('evapPumpRun', pump, 7_200_000, 60)).toBeNaN();
		expect(valueInForce('evapPumpRun', pump, -1, 60)).toBeNaN();
	});

	it('are laid out by the same rule, never interpolated', () => {
		const instants = Float64Array.of(0, 300_000, 600_000, 1_500_000, 1_600_000);
		const { evapWaterOut, running } = expandHeld({ evapWaterOut: temperature, running: pump }, instants);
		expect(Array.from(evapWaterOut?.v ?? [])).toEqual([12, 12, 9, 9, NaN]);
		expect(evapWaterOut?.t).toBe(instants);
		expect(running).toBe(pump);
	});

	it('are laid on instants that hold each start, five seconds around it', () => {
		const instants = holdInstants(0, 7_200_000, [{ from: 3_601_000, to: 5_000_000 }]);
		expect(instants).toContain(3_601_000);
		expect(instants).toContain(3_606_000);
		expect(instants.at(-1)).toBe(7_200_000);
		expect(Array.from(instants).every((at, i) => i === 0 || at > (instants[i - 1] ?? Infinity))).toBe(true);
	});
});

describe('interval readings', () => {
	it('are in force while no older than asked, blanks skipped', () => {
		const series: Series = { t: Float64Array.of(0, 5000, 10_000), v: Float64Array.of(7, 8, NaN), logging: 'interval' };
		expect(valueInForce('oilTemp', series, 10_000, 5)).toBe(8);
		expect(valueInForce('oilTemp', series, 11_000, 5)).toBeNaN();
	});
});
