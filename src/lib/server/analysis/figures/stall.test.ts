import { describe, expect, it } from 'vitest';
import type { CircuitInput } from '$lib/model/circuit-input';
import { DEFAULT_LIMITS } from '$lib/model/unit';
import { inventedContext } from '../testing/context';
import { inventedLog, MIDNIGHT, type Shape } from '../testing/synthetic-log';
import { findStall } from './stall';

// Common practice, no source: a sound machine loads past 100 % when asked; one that stands at 85–90 with more asked stalls.
const upTo =
	(level: number): Shape =>
	(_, s) =>
		Number.isNaN(s) ? 0 : Math.min(45 + s / 6, level);
const sound: Record<string, Shape> = {
	capacity: upTo(87),
	demand: () => 100,
	motorCurrent: () => 78,
	evapSaturation: () => 5,
	condSaturation: () => 36,
	evapWaterOut: () => 10,
	waterSetpoint: () => 6.5
};
const rated = { nature: { ratedAmps: 100 } };
const stall = (shapes: Record<string, Shape> = {}, more: Partial<CircuitInput> = rated, spacing = 5, stage = 0) =>
	findStall(inventedContext(3600, spacing, { ...sound, ...shapes }, more), stage);
const without = (...ids: string[]) => {
	const left = Object.fromEntries(Object.entries(sound).filter(([id]) => !ids.includes(id)));
	return findStall(inventedContext(3600, 5, left, rated));
};

describe('findStall', () => {
	it('finds capacity flat short of demand, with its level and ends', () => {
		const found = stall();
		expect(found).toMatchObject({ verdict: 'stall', demandPct: 100, limiting: null });
		expect(found?.levelPct).toBeCloseTo(87, 9);
		// It stands from 252 s on, to 30 s before the stop.
		const [from, to] = [found?.from ?? 0, found?.to ?? 0].map((at) => (at - MIDNIGHT) / 1000 - 3600);
		expect(Math.abs((from ?? 0) - 252)).toBeLessThan(45);
		expect(Math.abs((to ?? 0) - 3570)).toBeLessThanOrEqual(30);
		expect(stall({}, rated, 60)?.verdict).toBe('stall');
	});

	it('finds none when full, when demand is met, or while it moves', () => {
		expect(stall({ capacity: upTo(99) })).toBeNull();
		expect(stall({ demand: () => 90 })).toBeNull();
		expect(stall({ capacity: (_, s) => 50 + s / 120 })).toBeNull();
	});

	it('takes warm water where demand is not logged, or where it came down to the capacity', () => {
		expect(without('demand')?.verdict).toBe('stall');
		expect(without('demand', 'waterSetpoint')).toBeNull();
		expect(stall({ demand: (_, s) => (s < 300 ? 100 : 88) })?.verdict).toBe('stall');
		expect(stall({ demand: (_, s) => (s < 300 ? 100 : 88), evapWaterOut: () => 7.5 })).toBeNull();
	});

	it('names the limit that holds it', () => {
		expect(stall({ motorCurrent: () => 98 })).toMatchObject({ verdict: 'limited', limiting: 'motor current' });
		expect(stall({ condSaturation: () => 47 })).toMatchObject({ verdict: 'limited', limiting: 'condensing' });
		expect(stall({ evapSaturation: () => 1 })).toMatchObject({ verdict: 'limited', limiting: 'evaporator saturation' });
		const limits = {
			...DEFAULT_LIMITS,
			condSaturationCutout: [{ value: 38, provenance: 'maker' as const, validFrom: -Infinity }]
		};
		expect(stall({}, { ...rated, limits })?.limiting).toBe('condensing');
	});

	it('believes the log’s own words about limits', () => {
		const words = (text: string) => ({
			...rated,
			texts: { activeLimit: { t: Float64Array.of(MIDNIGHT), text: [text] } }
		});
		expect(stall({}, words('External demand limit'))).toMatchObject({
			verdict: 'limited',
			limiting: 'external demand limit'
		});
		expect(stall({}, words('None'))?.verdict).toBe('stall');
	});

	it('cannot tell where what may limit it is not logged', () => {
		expect(without('motorCurrent')?.verdict).toBe('cannot-tell');
	});

	it('allows a stepped machine the distance of a stage', () => {
		expect(stall({ capacity: upTo(75), demand: () => 90 }, rated, 5, 25)).toBeNull();
		expect(stall({ capacity: upTo(50), demand: () => 100 }, rated, 5, 25)?.verdict).toBe('stall');
	});

	it('cannot tell by water alone while a sister circuit may have room', () => {
		const running = inventedLog([{ start: 0, stop: 9000 }], 60, 0, 9000).running;
		if (running === undefined) throw new Error('no running');
		const others = [{ name: '2', sameUnit: true, running }];
		const left = Object.fromEntries(Object.entries(sound).filter(([id]) => id !== 'demand'));
		const found = (capacity: number | null) => {
			const sister = others.map((o) =>
				capacity === null ? o : { ...o, capacity: { ...running, v: running.v.map(() => capacity) } }
			);
			return findStall(inventedContext(3600, 5, left, { ...rated, others: sister }))?.verdict;
		};
		expect([found(null), found(60), found(100)]).toEqual(['cannot-tell', 'cannot-tell', 'stall']);
	});

	it('takes a met setpoint for what holds it, whatever the demand says', () => {
		expect(stall({ evapWaterOut: () => 6.4 })).toMatchObject({ verdict: 'limited', limiting: 'met setpoint' });
		expect(stall({ evapWaterOut: () => 6.8 })?.verdict).toBe('stall');
		expect(stall({ evapWaterOut: () => 6.8, capacity: upTo(50) }, rated, 5, 25)).toBeNull();
	});

	it('cannot tell where the capacity was taken down while more was demanded', () => {
		const takenDown: Shape = (_, s) => (Number.isNaN(s) ? 0 : s < 1500 ? Math.min(45 + s / 6, 100) : 60);
		expect(stall({ capacity: takenDown })?.verdict).toBe('cannot-tell');
		const limits = { ...rated, texts: { activeLimit: { t: Float64Array.of(MIDNIGHT), text: ['None'] } } };
		expect(stall({ capacity: takenDown }, limits)?.verdict).toBe('stall');
	});

	it('takes an early hold that goes on loading for a ramp', () => {
		const ramp: Shape = (_, s) => (s < 660 ? 50 : Math.min(50 + (s - 660) / 6, 100));
		expect(stall({ capacity: ramp })).toBeNull();
	});
});
