import { expect, it } from 'vitest';
import type { Series } from '$lib/model/series';
import { lowerBound, signalsOf, traceReader } from './trace-reader';

const series = (t: number[], v: number[], logging: Series['logging'] = 'interval'): Series => ({
	t: Float64Array.from(t),
	v: Float64Array.from(v),
	logging
});
const reader = traceReader({
	suctionTemp: series([0, 1000, 2000, 3000], [10, 11, NaN, 13]),
	evapSaturation: series([500, 1500, 2500], [4, 5, 6]),
	capacity: series([0, 2_000_000], [40, 80], 'change')
});

it('takes medians of readings only, and differences of the parts’ medians (by hand)', () => {
	expect(reader.values('suctionTemp', 0, 3000)).toEqual([10, 11, 13]);
	expect(reader.median('suctionTemp', 0, 3000)).toBe(11);
	expect(reader.median('superheat', 0, 3000)).toBe(6);
	expect(reader.median('suctionTemp', 1500, 2500)).toBeNull();
});

it('holds a change-of-value reading 15 min, and no longer', () => {
	expect(reader.values('capacity', 600_000, 610_000)).toEqual([40]);
	expect(reader.values('capacity', 1_000_000, 1_010_000)).toEqual([]);
	expect(reader.last('capacity', 800_000, 1000)).toBe(40);
	expect(reader.last('suctionTemp', 10_000, 1000)).toBeNull();
});

it('names what a trace lacks', () => {
	expect(reader.has('superheat')).toBe(true);
	expect(reader.lacking('margin')).toEqual(['oilTemp', 'condSaturation']);
	expect(signalsOf('phaseCurrents.2')).toEqual(['phaseCurrents']);
	expect(lowerBound(Float64Array.from([1, 2, 4]), 3)).toBe(2);
});
