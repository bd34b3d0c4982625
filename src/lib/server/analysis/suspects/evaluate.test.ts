import { describe, expect, it } from 'vitest';
import type { SuspectsResult } from '$lib/model/suspect';
import { cluesOfStart, evaluateSuspects } from './evaluate';
import type { SuspectEvidence } from './evidence';
import { inventedWeek, type Picture } from './testing/invented-week';

// Invented weeks, each with one signature of signatures.md (common practice of the trade, no source).
const mornings = (_: number, morning: boolean) => (morning ? 80 : null);
const everyThird = (day: number, morning: boolean) => ((2 * day + (morning ? 0 : 1)) % 3 === 0 ? 80 : null);

const CAUSES: Record<string, Partial<Picture>> = {
	'valve-underfeeding': {
		tripAfter: everyThird,
		superheat: (since, trips) => (trips ? 3 + since / 8 : 2.5),
		dischargeSuperheat: (since, trips) => (trips ? 8 + since / 4 : Math.min(14, 6 + since / 20)),
		valve: (since, trips) => (trips ? 14 : Math.min(58, 30 + since / 8))
	},
	'slide-not-unloading': { tripAfter: mornings, startCapacity: 80, stopCapacity: 78 },
	'low-oil': { tripAfter: mornings, startCapacity: 60, ceiling: 88, margin: 17, stopCapacity: 60 },
	'evap-saturation-sensor': { tripAfter: mornings, sensorOffset: -3.5 },
	'cold-condenser-water': {
		tripAfter: mornings,
		condWater: (morning) => (morning ? 14 : 25),
		superheat: (since, trips) => (trips ? 2.5 + since / 20 : 2.5)
	},
	'low-water-flow': { tripAfter: mornings, flow: 0.55 },
	'low-refrigerant-charge': {
		tripAfter: everyThird,
		subcooling: 0.4,
		superheat: (since, trips) => (trips ? 3 + since / 10 : 8),
		dischargeSuperheat: (since, trips) => (trips ? 8 + since / 5 : 22),
		valve: (since) => Math.min(96, 40 + since / 2),
		approach: 4
	},
	'oil-restriction': { tripAfter: mornings, margin: -5 },
	'refrigerant-migration': {
		tripAfter: mornings,
		oilLift: 3,
		dischargeSuperheat: (since, trips) => (trips ? 1 : Math.min(14, 6 + since / 20))
	}
};

const first = (result: SuspectsResult) => result.suspects[0];

describe('the same trip, other causes', () => {
	it.each(Object.keys(CAUSES))('%s stands first', (key) => {
		for (const spacing of [5, 15]) {
			const result = evaluateSuspects(inventedWeek(CAUSES[key] ?? {}, { spacing }));
			expect(result.verdict).toBe('fault-pattern');
			expect(first(result)?.key).toBe(key);
			expect(['points-to', 'fits']).toContain(first(result)?.standing);
		}
	});

	it('finds a slide that does not load without any trip', () => {
		const result = evaluateSuspects(inventedWeek({ ceiling: 66 }));
		expect(result.verdict).toBe('fault-pattern');
		expect(first(result)?.key).toBe('slide-not-loading');
	});

	it('finds a fouled condenser and a fouled evaporator in settled runs', () => {
		expect(first(evaluateSuspects(inventedWeek({ condApproach: 6 })))?.key).toBe('fouled-condenser');
		expect(first(evaluateSuspects(inventedWeek({ approach: 6 })))?.key).toBe('fouled-evaporator');
	});
});

describe('what a log cannot tell', () => {
	it('leaves a sound unit clean', () => {
		const result = evaluateSuspects(inventedWeek({}));
		expect(result.verdict).toBe('no-fault-pattern');
		expect(result.suspects.filter((one) => one.standing === 'points-to' || one.standing === 'fits')).toEqual([]);
	});

	it('cannot tell a starved valve once the discriminating signals are gone, and names them', () => {
		const without = ['suctionTemp', 'dischargeTemp', 'valvePosition', 'liquidTemp'] as const;
		const result = evaluateSuspects(inventedWeek(CAUSES['valve-underfeeding'] ?? {}, { without }));
		expect(result.verdict).toBe('cannot-tell');
		for (const signal of without.slice(0, 3)) expect(result.missingSignals).toContain(signal);
	});

	it('says no better than fits when the spacing exceeds a third of the time to trip', () => {
		const result = evaluateSuspects(inventedWeek(CAUSES['slide-not-unloading'] ?? {}, { spacing: 40 }));
		expect(first(result)).toMatchObject({ key: 'slide-not-unloading', standing: 'fits' });
	});

	it('cannot tell from an empty log', () => {
		const { input } = inventedWeek({});
		expect(evaluateSuspects({ input: { ...input, series: {} }, starts: [] }).verdict).toBe('cannot-tell');
	});
});

describe('what people find overrules the log', () => {
	const evidence = inventedWeek(CAUSES['low-oil'] ?? {});
	const withCheck = (heightMm: number, indicative: boolean): SuspectEvidence => ({
		...evidence,
		checks: [{ kind: 'oil-level', at: 1, heightMm, lowMm: 127, highMm: 254, indicative, signed: true }]
	});
	const lowOil = (result: SuspectsResult) => result.suspects.find((one) => one.key === 'low-oil');

	it('takes low oil from the top when the level was read in band', () => {
		const result = evaluateSuspects(withCheck(180, false));
		expect(first(result)?.key).not.toBe('low-oil');
	});

	it('counts an indicative reading half', () => {
		const weight = (indicative: boolean) =>
			lowOil(evaluateSuspects(withCheck(60, indicative)))?.clues.find((clue) => clue.key === 'oil-level-low')?.weight;
		expect(weight(false)).toBe(1);
		expect(weight(true)).toBe(0.5);
	});
});

describe('cluesOfStart', () => {
	const evidence = inventedWeek(CAUSES['valve-underfeeding'] ?? {});
	const tripped = evidence.starts.find((start) => start.outcome === 'tripped');

	it('gives the clues of the one start, strongest first, in the person’s units', () => {
		const clues = cluesOfStart({ ...evidence, units: 'ip' }, tripped?.startedAt ?? 0);
		expect(clues[0]?.suspect).toBe('valve-underfeeding');
		expect(clues.some((clue) => clue.sentence.includes('°F'))).toBe(true);
		expect(clues.every((clue) => clue.direction !== 'missing')).toBe(true);
	});

	it('refuses a start that is not there', () => {
		expect(() => cluesOfStart(evidence, 12)).toThrow(RangeError);
	});
});
