import { describe, expect, it } from 'vitest';
import type { TraceKey } from '$lib/model/signals';
import type { StartTrace, StartTraces } from './start-traces';
import { tripMinute } from './trip-minute';

/** Invented readings every 5 s from the start on. */
function setOf(startMs: number, values: Partial<Record<TraceKey, number[]>>): StartTraces {
	const traces = new Map<TraceKey, StartTrace>();
	let stops = new Float64Array();
	for (const [name, list] of Object.entries(values)) {
		const key = name as TraceKey;
		stops = Float64Array.from(list, (_, k) => startMs + k * 5000);
		traces.set(key, {
			key,
			label: name,
			quantity: 'temperature',
			own: null,
			hold: false,
			t: stops,
			v: Float32Array.from(list)
		});
	}
	return { startId: 's', startMs, traces, gaps: [], marks: [], spacing: 5000, stops };
}

describe('tripMinute', () => {
	const main = setOf(1e12, {
		evapSaturation: [9, 8, 7, 6, 5, 4, 3, 2, 1, 0],
		oilTemp: [40, 40, 40, 40, 40, 40, 40, 40, 40, 40]
	});
	const held = setOf(2e12, { evapSaturation: [9, 9, 9, 9, 9, 8, 8, 8, 8, 8] });

	it('takes the last six samples up to the trip, and the held start at the same elapsed time', () => {
		const minute = tripMinute(main, held, 'low-evaporator-saturation', 37, 'si', 101.325);
		expect(minute?.seconds).toEqual([10, 15, 20, 25, 30, 35]);
		expect(minute?.rows.map(({ key }) => key)).toEqual(['evapSaturation']);
		expect(minute?.rows[0]?.own.map((r) => r?.text)).toEqual(['7.0', '6.0', '5.0', '4.0', '3.0', '2.0']);
		expect(minute?.rows[0]?.held.map((r) => r?.text)).toEqual(['9.0', '9.0', '9.0', '8.0', '8.0', '8.0']);
	});
	it('chooses the signals by the kind of trip', () => {
		expect(tripMinute(main, null, 'high-oil-temperature', 20, 'si', 101.325)?.rows[0]?.key).toBe('oilTemp');
	});
	it('is nothing without a telling signal or a sample', () => {
		expect(tripMinute(main, null, 'loss-of-water-flow', 20, 'si', 101.325)).toBeNull();
		expect(tripMinute(main, null, 'low-evaporator-saturation', -5, 'si', 101.325)).toBeNull();
	});
});
