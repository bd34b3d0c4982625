import { describe, expect, it } from 'vitest';
import type { UnitNature } from '$lib/model/unit';
import { inventedCircuit } from '../testing/context';
import type { Shape } from '../testing/synthetic-log';
import { stageOf } from './stages';

const stage = (capacity: Shape, nature: UnitNature = {}) =>
	stageOf(inventedCircuit([{ start: 3600, stop: 14_400 }], 5, 15_000, { capacity }, { nature }));
const stepped: Shape = (_, s) => (Number.isNaN(s) ? 0 : Math.min(100, 25 * (1 + Math.floor(s / 1500))));

describe('stageOf', () => {
	it('reads the stage of a stepped machine from its levels', () => {
		expect(stage(stepped)).toBe(25);
		expect(stage(stepped, { capacityControl: 'steps' })).toBe(25);
	});

	it('is zero on a slide, by nature or by readings', () => {
		expect(stage(stepped, { capacityControl: 'slide' })).toBe(0);
		expect(stage((_, s) => (Number.isNaN(s) ? 0 : 40 + 55 * Math.abs(Math.sin(s / 900))))).toBe(0);
		expect(stage((_, s) => (Number.isNaN(s) ? 0 : 70))).toBe(0);
	});
});
