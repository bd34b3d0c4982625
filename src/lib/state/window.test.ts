import { describe, expect, it } from 'vitest';
import { instantsOf, windowOf } from './window';

describe('the period of an address', () => {
	const url = new URL('http://x/units/u?from=2026-05-04&to=2026-05-05&circuit=2');
	it('is two dates and a circuit', () => {
		expect(windowOf(url)).toEqual({ from: '2026-05-04', to: '2026-05-05', circuit: '2' });
	});
	// IANA tz: Berlin is 2 h ahead of UTC in May.
	it('is whole days of the site as instants', () => {
		expect(instantsOf(url, 'Europe/Berlin')).toEqual({
			from: '2026-05-03T22:00:00.000Z',
			to: '2026-05-05T22:00:00.000Z',
			circuit: '2'
		});
		expect(instantsOf(new URL('http://x/?from=soon'), 'UTC')).toEqual({ from: null, to: null, circuit: null });
	});
});
