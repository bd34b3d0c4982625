import { expect, it } from 'vitest';
import { periodContext } from './context';
import { oilOverAmbient, restOffset } from './rest-readings';
import { inventedWeek } from './testing/invented-week';

it('reads the resting offset with the pump proved (invented: the sensor is set 3.5 K low, the shell 0.1 K)', () => {
	const rest = restOffset(periodContext(inventedWeek({ sensorOffset: -3.5 }, { spacing: 15 })), 'logged');
	expect(rest?.value).toBeCloseTo(-3.6, 1);
	expect(rest?.proved).toBe(true);
	expect(rest?.rests.length).toBeGreaterThan(10);
});

it('finds that the pressure has no such offset', () => {
	const rest = restOffset(periodContext(inventedWeek({ sensorOffset: -3.5 }, { spacing: 15 })), 'pressure');
	expect(rest?.value).toBeCloseTo(-0.1, 1);
});

it('says when nothing proves that water moved', () => {
	const week = inventedWeek({}, { spacing: 15, without: ['evapPumpRun', 'evapFlow'] });
	expect(restOffset(periodContext(week), 'logged')?.proved).toBe(false);
});

it('reads how far the oil stays over its surroundings (invented: 22 K)', () => {
	const rest = oilOverAmbient(periodContext(inventedWeek({}, { spacing: 15 })));
	expect(rest?.value).toBeGreaterThan(20);
	expect(oilOverAmbient(periodContext(inventedWeek({}, { spacing: 15, without: ['oilTemp'] })))).toBeNull();
});
