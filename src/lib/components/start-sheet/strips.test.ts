import { describe, expect, it } from 'vitest';
import { DERIVED, isSignalKey, SIGNALS } from '$lib/model/signals';
import { missingWords, stripsFor, stripsOfStart, tracesOf } from './strips';

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

describe('stripsOfStart', () => {
	it('shows flow and pressures only where the log could give them, the others always', () => {
		const keys = (reasons: Record<string, string>) => stripsOfStart({}, reasons).map(({ key }) => key);
		expect(keys({})).toContain('flow');
		const missing = { flow: 'signal-missing', systemDeltaAt60s: 'signal-missing', minOilNet: 'run-too-short' };
		expect(keys(missing)).not.toContain('flow');
		expect(keys(missing)).toContain('pressures');
		expect(keys(missing)).toContain('oil');
	});
});

describe('tracesOf', () => {
	it('names each once', () => {
		const keys = tracesOf(stripsFor({}));
		expect(new Set(keys).size).toBe(keys.length);
		expect(keys).toContain('evapApproach');
	});
});

describe('missingWords', () => {
	const said = (key: string) => {
		const spec = stripsFor({ condenser: 'air' }).find((strip) => strip.key === key);
		return spec && missingWords(spec);
	};
	it('names what would be drawn', () => {
		expect(said('oil')).toBe('Oil temperature is not in this log.');
		expect(said('loading')).toBe('Demand and capacity are not in this log.');
		expect(said('lift')).toMatch(/^Lift cannot be worked out/);
	});
});
