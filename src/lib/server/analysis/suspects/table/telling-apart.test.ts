import { describe, expect, it } from 'vitest';
import { saturationPressure } from '../../refrigerants/saturation';
import { periodContext, sideContext } from '../context';
import { evaluateSuspects } from '../evaluate';
import { suctionOffset } from '../rest-readings';
import { inventedWeek, type Picture } from '../testing/invented-week';

// Invented weeks; what tells the causes apart is common practice of the trade, no source.
const on = (since: number) => !Number.isNaN(since);
const someStarts = (day: number, morning: boolean) => ((2 * day + (morning ? 0 : 1)) % 3 === 0 ? 80 : null);

function clue(picture: Partial<Picture>, suspect: string, key: string) {
	const { suspects } = evaluateSuspects(inventedWeek(picture, { spacing: 15 }));
	return suspects.find((one) => one.key === suspect)?.clues.find((one) => one.key === key);
}

describe('oil that loses its pressure on the way', () => {
	const oilShare = (share: number): Partial<Picture> => ({
		tripAfter: someStarts,
		tripText: 'low oil flow trip',
		shapes: {
			oilPressure: (_, since) => {
				const [evap, cond] = [saturationPressure('R-134a', 5) ?? NaN, saturationPressure('R-134a', 30) ?? NaN];
				return on(since) ? evap + (1 - share) * (cond - evap) : evap;
			}
		}
	});

	it('speaks for the line when half of the difference is lost, and against too little of it', () => {
		expect(clue(oilShare(0.6), 'oil-restriction', 'oil-pressure-lost')?.direction).toBe('for');
		expect(clue(oilShare(0.6), 'low-pressure-difference', 'oil-pressure-lost')?.direction).toBe('against');
	});

	it('says nothing of a clean line', () => {
		expect(clue(oilShare(0.15), 'oil-restriction', 'oil-pressure-lost')).toBeUndefined();
	});
});

describe('a suction sensor that reads low', () => {
	const low: Partial<Picture> = { nature: { evaporator: 'dx' }, superheat: () => 0.1, dischargeSuperheat: () => 22 };

	it('shows as superheat gone under a dry discharge, and speaks against a valve that overfeeds', () => {
		const { suspects } = evaluateSuspects(inventedWeek(low, { spacing: 15 }));
		expect(suspects[0]?.key).toBe('suction-temperature-sensor');
		const overfeeding = suspects.find((one) => one.key === 'valve-overfeeding');
		expect(overfeeding?.clues.some((one) => one.key === 'discharge-dry')).toBe(true);
	});

	it('is read at rest before any pump starts (invented: 3 K over)', () => {
		const offset = suctionOffset(periodContext(inventedWeek(low, { spacing: 15 })));
		expect(offset?.value).toBeCloseTo(3, 0);
		expect(offset?.air).toBeNull();
	});
});

describe('trips that nobody recorded', () => {
	const week = inventedWeek({ tripAfter: someStarts }, { spacing: 15 });
	const unrecorded = { ...week, starts: week.starts.map((start) => ({ ...start, trip: null })) };

	it('speak of the low side while saturation went low', () => {
		expect(sideContext(unrecorded, periodContext(unrecorded), 'low-side').bad.length).toBeGreaterThan(0);
	});

	it('say nothing of it where it stayed high', () => {
		const high = {
			...unrecorded,
			input: {
				...unrecorded.input,
				limits: {
					...unrecorded.input.limits,
					evapSaturationCutout: [{ value: -12, provenance: 'given' as const, validFrom: -Infinity }]
				}
			}
		};
		expect(sideContext(high, periodContext(high), 'low-side').bad).toEqual([]);
	});
});

it('works the pressure difference out from saturations where no pressure is logged', () => {
	const week = inventedWeek({}, { spacing: 15, without: ['evapPressure', 'condPressure'] });
	const context = periodContext(week);
	const expected = (saturationPressure('R-134a', 31.8) ?? NaN) - (saturationPressure('R-134a', 5.3) ?? NaN);
	const read = context.window('systemDelta', 1200, 1500, context.starts)?.value ?? NaN;
	expect(Math.abs(read - expected)).toBeLessThan(60);
	expect(context.reader.has('evapPressure')).toBe(false);
});

it('takes an evaporator that nobody described for direct expansion when its runs settle dry', () => {
	const nature = (superheat: number) =>
		periodContext(inventedWeek({ nature: { evaporator: null }, superheat: () => superheat }, { spacing: 15 })).nature
			.evaporator;
	expect(nature(5)).toBe('dx');
	expect(nature(2)).toBeNull();
});
