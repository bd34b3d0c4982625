import { describe, expect, it } from 'vitest';
import { daysPicture, startPicture } from './brief-pictures';

// Invented days and readings.
const stroke = (from: number, to: number, outcome: 'tripped' | 'held') => ({
	startId: '00000000-0000-4000-8000-000000000000',
	circuit: '1',
	from,
	to,
	beganBefore: false,
	goesOn: false,
	outcome,
	startupTrip: outcome === 'tripped',
	attended: false
});

describe('daysPicture', () => {
	it('shows the hours that hold every run, a trip’s bar, and days without a log', () => {
		const picture = daysPicture(
			[
				{ date: '2026-03-02', strokes: [stroke(370, 372, 'tripped'), stroke(390, 1000, 'held')], logged: [[0, 1440]] },
				{ date: '2026-03-03', strokes: [], logged: [] }
			],
			300
		);
		expect(picture.hours.map(({ text }) => text)).toEqual(['06', '08', '10', '12', '14', '16', '18']);
		expect(picture.dates.map(({ text }) => text)).toEqual(['2', '3']);
		expect(picture.strokes.trip).not.toBe('');
		expect(picture.bare).toMatch(/^M34 /);
	});
});

describe('startPicture', () => {
	const axis = { low: 0, high: 10, symbol: '°C', toSeconds: 120 };
	const start = {
		startId: '00000000-0000-4000-8000-000000000000',
		at: '2026-03-02T05:10:00Z',
		clock: '06:10',
		day: 'Mon 2 Mar',
		outcome: 'tripped',
		text: 'tripped',
		traces: [
			{ signal: 'evapSaturation', label: 'saturation', family: 'low', t: [-30, 0, 60, 120], v: [10, 10, null, 0] }
		],
		tripAt: 90,
		cutout: 5
	};

	it('puts readings, trip and cut-out on one axis, and draws nothing over a break', () => {
		const picture = startPicture(start, axis, { width: 184, height: 121 }, true);
		// By hand: 150 s over 149 px from 34; 10 units over 100 px from 104 up to 4.
		expect(picture.traces[0]?.path).toBe('M34 4L63.8 4M183 104');
		expect(picture.trip).toBe('M153.2 4V104');
		expect(picture.level?.path).toBe('M34 54H183');
		expect(picture.level?.label.text).toBe('cut-out 5.0 °C');
	});

	it('leaves out a trip beyond the paper and names only where asked', () => {
		const picture = startPicture({ ...start, tripAt: 500, cutout: null }, axis, { width: 184, height: 121 }, false);
		expect(picture.trip).toBe('');
		expect(picture.level).toBeNull();
		expect(picture.traces[0]?.label).toBeNull();
	});
});
