import { describe, expect, it } from 'vitest';
import type { TraceKey } from '$lib/model/signals';
import { readStrip, readTrace } from './read-strip';
import type { StartTrace, StartTraces } from './start-traces';
import { stripsFor } from './strips';

const startMs = Date.UTC(2031, 2, 4, 7, 0, 0);

/** Invented readings every 10 s from the start on. */
function setOf(values: Partial<Record<TraceKey, number[]>>, hold = false): StartTraces {
	const traces = new Map<TraceKey, StartTrace>();
	let stops = new Float64Array();
	for (const [name, list] of Object.entries(values)) {
		const key = name as TraceKey;
		const t = Float64Array.from(list, (_, k) => startMs + k * 10_000);
		const quantity = key === 'evapApproach' || key === 'margin' ? 'temperatureDifference' : 'temperature';
		traces.set(key, { key, label: name, quantity, own: null, hold, t, v: Float32Array.from(list) });
		stops = t;
	}
	return { startId: 's', startMs, traces, gaps: [], marks: [], spacing: 10_000, stops };
}

describe('readTrace', () => {
	const set = setOf({ evapSaturation: [5, 4, Number.NaN, 2], margin: [6, -3, 0, 1] });

	it('reads the stored sample, with its own instant, in the person’s units', () => {
		const reading = readTrace(set, 'evapSaturation', 12, 'ip', 101.325);
		expect(reading).toEqual({ at: startMs + 10_000, stored: 4, text: '39.2' });
	});
	it('prints a margin with its sign, as a difference', () => {
		expect(readTrace(set, 'margin', 0, 'ip', 101.325)?.text).toBe('+10.8');
		expect(readTrace(set, 'margin', 10, 'si', 101.325)?.text).toBe('−3.0');
	});
	it('has nothing for a signal that is not there', () => {
		expect(readTrace(set, 'oilTemp', 0, 'si', 101.325)).toBeNull();
	});
});

describe('readStrip', () => {
	const low = stripsFor({}).find(({ key }) => key === 'low-side');
	it('reads every trace and the derived values, this start and the held one', () => {
		if (!low) throw new Error('no low side');
		const main = setOf({ evapSaturation: [5, 4], evapWaterOut: [9, 8], evapApproach: [4, 4] });
		const lines = readStrip(low, main, setOf({ evapSaturation: [6, 6] }), 10, 'si', 101.325);
		expect(lines.map(({ key, reading, held }) => [key, reading?.text, held?.text])).toEqual([
			['evapWaterOut', '8.0', undefined],
			['evapSaturation', '4.0', '6.0'],
			['evapApproach', '4.0', undefined]
		]);
		expect(lines.at(-1)?.drawn).toBe(false);
	});
});
