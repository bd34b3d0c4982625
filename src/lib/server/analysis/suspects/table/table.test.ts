import { describe, expect, it } from 'vitest';
import type { Series } from '$lib/model/series';
import type { SuspectKey } from '$lib/model/suspect';
import { SUSPECT_KEYS } from '$lib/model/suspect';
import { SUSPECT_WORDS } from '$lib/model/words';
import { MIDNIGHT } from '../../testing/synthetic-log';
import { evaluateSuspects } from '../evaluate';
import { inventedWeek, type Picture } from '../testing/invented-week';
import { SUSPECT_TABLE } from './index';

// Invented weeks, one signature of signatures.md each (common practice of the trade, no source).
const mornings = (_: number, morning: boolean) => (morning ? 80 : null);
const someStarts = (day: number, morning: boolean) => ((2 * day + (morning ? 0 : 1)) % 3 === 0 ? 80 : null);
const on = (since: number) => !Number.isNaN(since);

/** A second machine that switches on a minute before each morning start. */
const neighbour: Series = {
	t: Float64Array.from({ length: 8 * 1440 }, (_, i) => MIDNIGHT + i * 60_000),
	v: Float64Array.from({ length: 8 * 1440 }, (_, i) => (i % 1440 >= 359 && i % 1440 < 700 ? 1 : 0)),
	logging: 'interval'
};

const SIGNATURES: Partial<Record<SuspectKey, Partial<Picture>>> = {
	'valve-overfeeding': {
		nature: { evaporator: 'dx' },
		approach: 4,
		superheat: () => 0.3,
		dischargeSuperheat: () => 3
	},
	'liquid-line-restriction': {
		nature: { evaporator: 'dx' },
		tripAfter: mornings,
		approach: 4,
		subcooling: 7,
		superheat: (since) => Math.min(16, 6 + since / 8),
		valve: (since) => Math.min(97, 40 + since)
	},
	'non-condensables': {
		condApproach: 5.5,
		shapes: {
			condPumpRun: () => 1,
			condSaturation: (_, since) => (on(since) ? 22 + 11 * (1 - Math.exp(-since / 60)) : 25)
		},
		condWater: () => 22,
		tripText: 'high condensing pressure trip',
		tripAfter: someStarts
	},
	'oil-heater': { oilLift: 1.5 },
	'starter-or-supply': {
		tripAfter: (day, morning) => (morning && day % 2 === 0 ? 10 : null),
		tripText: 'starter fault trip',
		shapes: {
			phaseCurrents: (_, since) => (on(since) ? 118 : 0),
			'phaseCurrents.2': (_, since) => (on(since) ? 99 : 0),
			'phaseCurrents.3': (_, since) => (on(since) ? 100 : 0)
		}
	},
	'plant-staging': {
		tripAfter: mornings,
		input: { others: [{ name: 'neighbour', sameUnit: false, running: neighbour }] }
	},
	'flow-proving': { tripAfter: someStarts, tripText: 'chilled water flow loss trip' },
	'limits-or-setup': {
		tripAfter: mornings,
		input: {
			limits: {
				startUpWindow: [{ value: 1200, provenance: 'ours', validFrom: -Infinity }],
				firstStartRest: [{ value: 21_600, provenance: 'ours', validFrom: -Infinity }],
				evapSaturationCutout: [{ value: -6, provenance: 'given', validFrom: -Infinity }]
			}
		}
	},
	'low-pressure-difference': {
		tripAfter: mornings,
		tripText: 'low system pressure difference trip',
		condWater: (morning) => (morning ? 9 : 24)
	},
	'water-short-circuit': {
		tripAfter: someStarts,
		shapes: { evapWaterIn: (_, since) => (on(since) ? 12.3 - 5 * (1 - Math.exp(-since / 400)) : 12.5) }
	},
	'suction-temperature-sensor': { tripAfter: someStarts, superheat: () => 12 }
};

const standing = (key: string, picture: Partial<Picture>) => {
	const { suspects } = evaluateSuspects(inventedWeek(picture, { spacing: 5 }));
	return suspects.find((one) => one.key === key);
};

describe('every suspect is a row', () => {
	it('of the model’s keys, once, with a name, a check, tools and cautions', () => {
		expect(SUSPECT_TABLE.map((row) => row.key).sort()).toEqual([...SUSPECT_KEYS].sort());
		for (const row of SUSPECT_TABLE) {
			expect(SUSPECT_WORDS[row.key]).toBeTruthy();
			expect(row.check.tools.length).toBeGreaterThan(0);
			expect(row.check.cautions.length).toBeGreaterThan(0);
			expect(row.clues.some((clue) => clue.direction === 'for' && clue.discriminates)).toBe(true);
		}
	});

	it('never suggests to defeat a protection', () => {
		for (const { check } of SUSPECT_TABLE)
			expect(check.title).not.toMatch(/bypass the|jumper|raise the|widen|disable|reset until/i);
	});

	it('has clues with keys of their own and weights of 0 to 1', () => {
		for (const { clues } of SUSPECT_TABLE) {
			expect(new Set(clues.map((clue) => clue.key)).size).toBe(clues.length);
			for (const { weight } of clues) expect(weight > 0 && weight <= 1).toBe(true);
		}
	});
});

describe('its signature lets it stand', () => {
	it.each(Object.keys(SIGNATURES) as SuspectKey[])('%s', (key) => {
		const found = standing(key, SIGNATURES[key] ?? {});
		expect(['points-to', 'fits']).toContain(found?.standing);
		expect(found?.rank).toBeLessThanOrEqual(2);
	});

	it('a finding of a person speaks about what it was about', () => {
		const evidence = inventedWeek({ approach: 4.6 }, { spacing: 15 });
		const oil = (heightMm: number) => ({
			kind: 'oil-level' as const,
			at: MIDNIGHT,
			heightMm,
			lowMm: 127,
			highMm: 254,
			indicative: false,
			signed: true
		});
		const added = { id: 'c', at: MIDNIGHT - 1000, text: 'oil added', aimedAt: ['low-oil' as const], newHistory: false };
		const { suspects } = evaluateSuspects({ ...evidence, checks: [oil(60)], changes: [added] });
		const inEvaporator = suspects.find((one) => one.key === 'oil-in-evaporator');
		expect(inEvaporator?.clues.find((clue) => clue.key === 'oil-added-and-gone')?.direction).toBe('for');
	});
});
