import { describe, expect, it } from 'vitest';
import type { FirstMover } from '$lib/model/wire/start-sheet';
import { layOutMoments } from './moments';

const departure = (signal: string, atSeconds: number) => ({
	signal,
	label: signal,
	atSeconds,
	errorSeconds: 5,
	direction: 'below' as const
});
const mover: FirstMover = {
	sentence: '',
	cannotTell: null,
	heldStarts: 6,
	fromSeconds: 0,
	tripAtSeconds: 100,
	departures: [departure('capacity', 10), departure('evapSaturation', 12), departure('valvePosition', 14)]
};

describe('layOutMoments', () => {
	const layout = layOutMoments(mover, 401);
	it('draws each departure with its error, the trip within the line', () => {
		// Worked by hand: 106 s over 400 px.
		expect(layout.crosses[0]).toMatchObject({ x: 38.2, from: 19.4, to: 57.1 });
		expect(layout.tripX).toBeCloseTo(377.9, 5);
	});
	it('keeps labels apart even where departures crowd', () => {
		for (const [k, a] of layout.labels.entries())
			for (const b of layout.labels.slice(k + 1)) {
				const apart = a.x + a.width <= b.x || b.x + b.width <= a.x || a.y + a.height <= b.y || b.y + b.height <= a.y;
				expect(`${a.key} ${b.key} ${apart}`).toBe(`${a.key} ${b.key} true`);
			}
		expect(layout.labels.map(({ key }) => key)).toContain('trip');
	});
});
