import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { crossesTrace, type LabelGround, placeLabels, placesAlong, placesAtLevel } from './label-placement';
import { bareExtents, coverLine, type Extents, traceExtents } from './trace-extents';

const size = { width: 40, height: 14 };

/** A level trace at `y` across a strip of 300 px. */
function level(y: number): Extents {
	const extents = bareExtents(300);
	coverLine(extents, 0, y, 300, y);
	return extents;
}

describe('placeLabels', () => {
	const ground: LabelGround = { width: 300, height: 60, traces: [level(30)], uprights: [100] };

	it('takes the first place that touches nothing', () => {
		const places = [
			{ x: 10, y: 22 },
			{ x: 80, y: 4 },
			{ x: 10, y: 4 }
		];
		expect(placeLabels([{ key: 'a', ...size, places }], ground).get('a')).toMatchObject({ x: 10, y: 4 });
	});
	it('drops a label rather than lay it over another', () => {
		const places = [{ x: 10, y: 4 }];
		const placed = placeLabels(
			[
				{ key: 'a', ...size, places },
				{ key: 'b', ...size, places }
			],
			ground
		);
		expect([...placed.keys()]).toEqual(['a']);
	});
	it('keeps off a level line', () => {
		const places = [
			{ x: 10, y: 40 },
			{ x: 10, y: 4 }
		];
		expect(placeLabels([{ key: 'a', ...size, places }], { ...ground, levels: [48] }).get('a')?.y).toBe(4);
	});
});

describe('placesAlong', () => {
	it('prefers the paper before the start, above the line', () => {
		expect(placesAlong(level(30), size, { width: 300, startX: 80 })[0]).toEqual({ x: 6, y: 13 });
	});
	it('goes after the start when there is no room before it', () => {
		expect(placesAlong(level(30), size, { width: 300, startX: 20 })[0]?.x).toBeGreaterThan(20);
	});
	it('has no place for a trace that is bare', () => {
		expect(placesAlong(bareExtents(300), size, { width: 300, startX: 80 })).toEqual([]);
	});
});

describe('placesAtLevel', () => {
	it('begins above the line at the right', () => {
		expect(placesAtLevel(30, size, { width: 300 })[0]).toEqual({ x: 254, y: 14.5 });
	});
});

describe('no label ever collides', () => {
	it('with traces, lines or labels, whatever the traces do', () => {
		const value = fc.double({ min: 0, max: 118, noNaN: true });
		fc.assert(
			fc.property(
				fc.array(fc.array(value, { minLength: 2, maxLength: 40 }), { minLength: 1, maxLength: 4 }),
				(rows) => {
					const traces = rows.map((v) => {
						const t = v.map((_, k) => (k * 300) / (v.length - 1));
						return traceExtents(
							{ t, v },
							(ms) => ms,
							(y) => y,
							{ from: 0, to: 300 },
							300
						);
					});
					const ground = { width: 300, height: 118, traces, uprights: [60, 200] };
					const placed = [
						...placeLabels(
							traces.map((trace, k) => ({
								key: String(k),
								...size,
								places: placesAlong(trace, size, { width: 300, startX: 60 })
							})),
							ground
						).values()
					];
					for (const [k, box] of placed.entries()) {
						expect(traces.some((trace) => crossesTrace(box, trace, 1))).toBe(false);
						expect(ground.uprights.some((x) => x >= box.x && x <= box.x + box.width)).toBe(false);
						for (const other of placed.slice(k + 1)) {
							const apartX = box.x + box.width <= other.x || other.x + other.width <= box.x;
							const apartY = box.y + box.height <= other.y || other.y + other.height <= box.y;
							expect(apartX || apartY).toBe(true);
						}
					}
				}
			),
			{ numRuns: 100 }
		);
	});
});
