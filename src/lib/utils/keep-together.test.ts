import { describe, expect, it } from 'vitest';
import { keepTogether } from './keep-together';

describe('keepTogether', () => {
	it('ties a figure to its unit', () => {
		expect(keepTogether('tripped 95 s in, 24 min after 12 %')).toBe(
			'tripped 95\u00a0s in, 24\u00a0min after 12\u00a0%'
		);
	});
	it('leaves words that only begin like a unit', () => {
		expect(keepTogether('2 suspects, 3 held, 4 stops')).toBe('2 suspects, 3 held, 4 stops');
	});
	it('ties units of two parts whole', () => {
		expect(keepTogether('6.5 L/s of 30 gpm')).toBe('6.5\u00a0L/s of 30\u00a0gpm');
	});
});
