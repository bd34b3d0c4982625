import { describe, expect, it } from 'vitest';
import type { Stroke } from '../model/wire/views';
import { evenClock } from './day-clock';
import { barsPath, dayEnd, loggableUntil, notRun, stripShapes, unlogged } from './day-strip';

// Invented strokes.
const stroke = (from: number, to: number, outcome: Stroke['outcome']): Stroke => ({
	startId: `${from}`,
	circuit: '1',
	from,
	to,
	beganBefore: false,
	goesOn: false,
	outcome,
	startupTrip: outcome === 'tripped',
	attended: false
});

describe('stripShapes', () => {
	it('draws trips last, over the run that follows at once', () => {
		const day = { strokes: [stroke(400, 402, 'tripped'), stroke(403, 900, 'held')] };
		expect(stripShapes(day, evenClock(1440), 7, 5, 15).map((s) => s.stroke.outcome)).toEqual(['held', 'tripped']);
	});
	it('lays a run at its minutes', () => {
		const [only] = stripShapes({ strokes: [stroke(720, 900, 'held')] }, evenClock(480), 7, 5, 15);
		expect(only?.x0).toBe(240);
		expect(only?.shape.right).toBe(300);
	});
	it('leaves a run without a trend log in outline', () => {
		const [logged] = stripShapes({ strokes: [stroke(720, 900, 'held')] }, evenClock(480), 7, 5, 15);
		const [noted] = stripShapes({ strokes: [{ ...stroke(720, 900, 'held'), noted: true }] }, evenClock(480), 7, 5, 15);
		expect(noted?.shape).toEqual({ ...logged?.shape, ink: '', open: logged?.shape.ink });
	});
});

describe('unlogged', () => {
	it('is what the log leaves of the day, slivers aside', () => {
		const logged: [number, number][] = [
			[600, 900],
			[5, 300],
			[300, 420]
		];
		expect(unlogged({ logged })).toEqual([
			[420, 600],
			[900, 1440]
		]);
	});
	it('is the whole day without a log', () => {
		expect(unlogged({ logged: [] })).toEqual([[0, 1440]]);
	});
});

describe('notRun', () => {
	it('wants a whole log and no run', () => {
		expect(notRun({ strokes: [], logged: [[0, 1440]] })).toBe(true);
		expect(notRun({ strokes: [], logged: [[0, 700]] })).toBe(false);
	});
});

describe('loggableUntil', () => {
	const now = { date: '2026-05-08', minute: 510 };
	it('ends today at the present minute, and asks nothing of tomorrow', () => {
		expect(loggableUntil('2026-05-07', now)).toBe(1440);
		expect(loggableUntil('2026-05-08', now)).toBe(510);
		expect(loggableUntil('2026-05-09', now)).toBe(0);
		expect(loggableUntil('2026-05-09', null)).toBe(1440);
	});
	it('keeps what is left of today from looking like a gap', () => {
		expect(unlogged({ logged: [[0, 505]] }, 510)).toEqual([]);
	});
});

describe('barsPath and dayEnd', () => {
	it('sets a bar every 4 px', () => {
		expect(barsPath(0, 9, 5, 8)).toBe('M0.5 1v8M4.5 1v8M8.5 1v8');
	});
	it('takes the 25th hour where a stroke needs it', () => {
		expect(dayEnd([{ strokes: [stroke(1300, 1490, 'held')], logged: [] }])).toBe(1490);
		expect(dayEnd([])).toBe(1440);
	});
});
