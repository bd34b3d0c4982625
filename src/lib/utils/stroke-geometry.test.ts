import { describe, expect, it } from 'vitest';
import { joinStrokes, LEAST_WIDTH, strokeShape } from './stroke-geometry';

// Geometry worked by hand from the look's table of marks, with h = 6, R = 18, centre 10.
const run = { x0: 10, x1: 70, y: 10, h: 6, row: 18 } as const;

describe('strokeShape', () => {
	it('cuts a tripped run h/2 shorter at the foot, and puts the bar after a gap of h/3', () => {
		const shape = strokeShape({ ...run, outcome: 'tripped' });
		expect(shape.ink).toBe('M10 7H70L67 13H10z');
		expect(shape.trip).toBe('M72 1.5h2v17h-2z');
		expect(shape.right).toBe(74);
	});
	it('keeps a body of 1.4 px under a very short trip, slanted by at most 0.7 of it', () => {
		expect(strokeShape({ ...run, x1: 10, outcome: 'tripped' }).ink).toBe('M10 7H11.4L10.42 13H10z');
	});
	it('rounds a held run by h/2', () => {
		expect(strokeShape({ ...run, outcome: 'held' }).ink).toBe('M10 7H67a3 3 0 0 1 0 6H10z');
	});
	it('ends a called-off run in an open square of side h + 2', () => {
		const shape = strokeShape({ ...run, outcome: 'called-off' });
		expect(shape.ink).toBe('M10 7h52v6h-52z');
		expect(shape.open).toBe('M62.75 6.75h6.5v6.5h-6.5z');
		expect(strokeShape({ ...run, x1: 12, outcome: 'called-off' }).ink).toBe('');
	});
	it('fades a lost run over 4.3 h and leaves three dots; an unclear one leaves none', () => {
		const lost = strokeShape({ ...run, outcome: 'lost' });
		expect(lost.ink.startsWith('M10 7h34.2v6h-34.2z')).toBe(true);
		expect(lost.ink.match(/a/g)).toHaveLength(6);
		expect(lost.fade.at(-1)?.opacity).toBeCloseTo(0.14, 2);
		expect(strokeShape({ ...run, outcome: 'unclear' }).ink).toBe('M10 7h34.2v6h-34.2z');
	});
	it('ends square where the run goes on past the strip, whatever its outcome', () => {
		const shape = strokeShape({ ...run, outcome: 'tripped', goesOn: true });
		expect(shape.ink).toBe('M10 7h60v6h-60z');
		expect(shape.trip).toBe('');
	});
	it('never draws a run narrower than the least width', () => {
		expect(strokeShape({ ...run, x1: 10, outcome: 'held' }).right).toBe(10 + LEAST_WIDTH);
	});
	it('refuses a stroke without height or ends', () => {
		expect(() => strokeShape({ ...run, h: 0, outcome: 'held' })).toThrow(RangeError);
		expect(() => strokeShape({ ...run, x1: NaN, outcome: 'held' })).toThrow(RangeError);
	});
});

describe('joinStrokes', () => {
	it('joins parts and gathers equal fades', () => {
		const lost = strokeShape({ ...run, outcome: 'lost' });
		const joined = joinStrokes([strokeShape({ ...run, outcome: 'tripped' }), lost, lost]);
		expect(joined.fade).toHaveLength(lost.fade.length);
		expect(joined.trip).not.toBe('');
		expect(joined.right).toBe(lost.right);
	});
});
