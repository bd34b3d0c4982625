import { describe, expect, it } from 'vitest';
import { DERIVED, isSignalKey, SIGNALS } from '$lib/model/signals';
import { stripsFor, tracesOf } from './strips';

describe('stripsFor', () => {
	it('keeps one quantity an axis', () => {
		for (const strip of stripsFor({}))
			for (const { key } of strip.traces) {
				const quantity = isSignalKey(key) ? SIGNALS[key].quantity : DERIVED[key].quantity;
				expect(`${strip.key} ${key} ${quantity}`).toBe(`${strip.key} ${key} ${strip.quantity}`);
			}
	});
	it('asks for air on an air-cooled machine, for water on the others', () => {
		const condenser = (kind: 'air' | 'water') =>
			stripsFor({ condenser: kind })
				.find((strip) => strip.key === 'condenser')
				?.traces.map((t) => t.key) ?? [];
		expect(condenser('air')).toContain('condAirIn');
		expect(condenser('air')).not.toContain('condWaterIn');
		expect(condenser('water')).toContain('condWaterOut');
	});
	it('calls the loading by the machine’s own word', () => {
		const label = stripsFor({ capacityControl: 'slide' })[0]?.traces.at(-1)?.label;
		expect(label).toBe('slide');
	});
});

describe('tracesOf', () => {
	it('names each once', () => {
		const keys = tracesOf(stripsFor({}));
		expect(new Set(keys).size).toBe(keys.length);
		expect(keys).toContain('evapApproach');
	});
});
