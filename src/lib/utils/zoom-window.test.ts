import { describe, expect, it } from 'vitest';
import { CLOSEST, dragWindow, panBy, zoomAbout } from './zoom-window';

const bounds = { from: -600, to: 3600 };

describe('zoomAbout', () => {
	it('keeps the instant under the pointer', () => {
		// Worked by hand: 100 s at a quarter of 0…400; half the time leaves it at a quarter of 50…250.
		expect(zoomAbout({ from: 0, to: 400 }, 2, 100, bounds)).toEqual({ from: 50, to: 250 });
	});
	it('stops at ten seconds and at the bounds', () => {
		const close = zoomAbout({ from: 0, to: 12 }, 50, 6, bounds);
		expect(close.to - close.from).toBe(CLOSEST);
		expect(zoomAbout({ from: 0, to: 400 }, 0.0001, 100, bounds)).toEqual(bounds);
	});
	it('slides inside rather than past the bounds', () => {
		expect(zoomAbout({ from: -600, to: -400 }, 0.5, -400, bounds)).toEqual({ from: -600, to: -200 });
	});
});

describe('panBy', () => {
	it('moves and stops at the edge without shrinking', () => {
		expect(panBy({ from: 0, to: 100 }, 50, bounds)).toEqual({ from: 50, to: 150 });
		expect(panBy({ from: 0, to: 100 }, -9000, bounds)).toEqual({ from: -600, to: -500 });
	});
});

describe('dragWindow', () => {
	it('takes either direction and widens a twitch', () => {
		expect(dragWindow(90, 30, bounds)).toEqual({ from: 30, to: 90 });
		expect(dragWindow(50, 52, bounds)).toEqual({ from: 46, to: 56 });
	});
});
