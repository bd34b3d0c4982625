import { expect, it } from 'vitest';
import { periodContext } from './context';
import { loadBands } from './load-bands';
import { inventedWeek } from './testing/invented-week';

it('reads superheat and valve at light and at heavy load (invented: 3 K and 12 K, from 60 % on)', () => {
	// Capacity begins at 45 % and rises by a point in 6 s from two minutes on: 60 % at 210 s, 72 % at 282 s.
	const week = inventedWeek(
		{ superheat: (since) => (since < 210 ? 3 : 12), valve: (since) => (since < 210 ? 50 : 97) },
		{ spacing: 15 }
	);
	const bands = loadBands(periodContext(week));
	expect(bands?.low.superheat).toBeCloseTo(3, 0);
	expect(bands?.high.superheat).toBeCloseTo(12, 0);
	expect(bands?.high.valve).toBeCloseTo(97, 0);
	expect(bands?.low.subcooling).toBeCloseTo(5, 0);
});

it('has no bands without superheat or without heavy load', () => {
	expect(loadBands(periodContext(inventedWeek({}, { spacing: 15, without: ['suctionTemp'] })))).toBeNull();
	expect(loadBands(periodContext(inventedWeek({ ceiling: 58 }, { spacing: 15 })))).toBeNull();
});
