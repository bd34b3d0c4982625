import { describe, expect, it } from 'vitest';
import { clockShare, columnTime, unrest } from './time-form';

const NOW = Date.UTC(2025, 11, 1);

describe('columnTime', () => {
	it('settles day and month over the whole column', () => {
		expect(columnTime(['05/03/2025 10:00', '13/03/2025 10:00'], NOW, false)?.orders).toEqual(['dmy']);
		expect(columnTime(['03/05/2025 10:00', '03/13/2025 10:00'], NOW, false)?.orders).toEqual(['mdy']);
		expect(columnTime(['03/05/2025 10:00', '03/06/2025 10:00'], NOW, false)?.orders).toEqual(['dmy', 'mdy']);
	});
	it('takes plain numbers only where they may be stamps', () => {
		const epochs = ['1741179600', '1741179660', '1741179720'];
		expect(columnTime(epochs, NOW, true)?.orders).toEqual(['epoch-s']);
		expect(columnTime(epochs, NOW, false)).toBeNull();
		expect(columnTime(['45721.5', '45721.6'], NOW, true)?.orders).toEqual(['serial']);
		expect(columnTime(['44.1', '44.2'], NOW, true)).toBeNull();
	});
	it('sees zone, clock and missing year', () => {
		expect(columnTime(['3/5/2025 1:00 PM EST'], NOW, false)).toMatchObject({ carriesZone: true, twelveHour: true });
		expect(columnTime(['2025-03-05'], NOW, false)?.hasClock).toBe(false);
		expect(columnTime(['03/05 01:00:00', '03/14 24:00:00'], NOW, false)).toMatchObject({
			hasYear: false,
			orders: ['md']
		});
	});
	it('reads month names without asking for an order', () => {
		expect(columnTime(['05-Mar-2025 01:00', '06-Mar-2025 01:00'], NOW, false)?.orders).toHaveLength(1);
	});
	it('is nothing when too few cells read', () => {
		expect(columnTime(['2025-03-05 10:00', 'x', 'y'], NOW, false)).toBeNull();
	});
});

describe('unrest', () => {
	it('prefers the reading in which midnight is one step', () => {
		const cells = ['04/05/2025 23:50', '04/05/2025 23:59', '05/05/2025 00:08', '06/05/2025 00:10'];
		expect(unrest(cells, 'dmy', NOW)).toBe(0);
		expect(unrest(cells, 'mdy', NOW)).toBeGreaterThan(0);
	});
	it('prefers the reading that is not in the future', () => {
		expect(unrest(['12/01/2025 00:00'], 'dmy', Date.UTC(2025, 5, 1))).toBe(0);
		expect(unrest(['12/01/2025 00:00'], 'mdy', Date.UTC(2025, 5, 1))).toBe(1);
	});
});

describe('clockShare', () => {
	it('counts clocks', () => {
		expect(clockShare(['13:00', '13:05', '', 'x'])).toBeCloseTo(2 / 3);
	});
});
