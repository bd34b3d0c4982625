import { describe, expect, it } from 'vitest';
import type { StartRecord, TripKind } from '$lib/model/start';
import { DEFAULT_LIMITS, type LimitHistory } from '$lib/model/unit';
import { inventedContext } from '../testing/context';
import type { Shape } from '../testing/synthetic-log';
import { learnBrackets, readHeadroom } from './headroom';
import { emptyFigures } from './sheet';

/** Falls by 0.1 K/s to `least` and stays. */
const falling =
	(least: number): Shape =>
	(_, s) =>
		Number.isNaN(s) ? 10 : Math.max(least, 10 - s / 10);
const given = (value: number) => [{ value, provenance: 'given' as const, validFrom: -Infinity }];
const context = (least: number, limits: LimitHistory = DEFAULT_LIMITS) =>
	inventedContext(1800, 5, { evapSaturation: falling(least), condSaturation: () => 40 }, { limits });
const tripped = (kind: TripKind): Pick<StartRecord, 'outcome' | 'trip'> => {
	return { outcome: 'tripped', trip: { at: 0, kind, basis: 'recorded', text: '', sureness: 1, reason: '' } };
};
const held: Pick<StartRecord, 'outcome' | 'trip'> = { outcome: 'held', trip: null };

describe('readHeadroom', () => {
	it('is the least distance to the limit, less slope × spacing', () => {
		const sheet = emptyFigures();
		readHeadroom(
			context(2, { ...DEFAULT_LIMITS, evapSaturationCutout: given(0), condSaturationCutout: given(50) }),
			sheet,
			[]
		);
		// Reaches 2 °C at 80 s, where it was still falling by 0.5 K a spacing.
		expect(sheet.figures['headroom.evapSaturation']).toBeCloseTo(1.5, 9);
		expect(sheet.figures['headroom.condSaturation']).toBe(10);
		expect(sheet.absent['headroom.oilTemp']?.reason).toBe('signal-missing');
	});

	it('counts only after the bypass', () => {
		const dip: Shape = (_, s) => (s < 60 ? -3 : 4);
		const limits = { ...DEFAULT_LIMITS, evapSaturationCutout: given(0), startBypass: given(60) };
		const sheet = emptyFigures();
		readHeadroom(inventedContext(1800, 5, { evapSaturation: dip }, { limits }), sheet, []);
		expect(sheet.figures['headroom.evapSaturation']).toBe(4);
	});

	it('says when no limit is known', () => {
		const sheet = emptyFigures();
		readHeadroom(context(2), sheet, []);
		expect(sheet.absent['headroom.evapSaturation']?.reason).toBe('no-limit');
	});
});

describe('learnBrackets', () => {
	const kind = 'low-evaporator-saturation';

	it('lies between the highest trip and the lowest survived', () => {
		const contexts = [-1, -0.4, 1.2, 3].map((least) => context(least));
		const [bracket] = learnBrackets(contexts, [tripped(kind), tripped(kind), held, held]);
		expect(bracket).toMatchObject({ protection: 'evapSaturation', inverted: false, trips: 2, survivals: 2 });
		expect(bracket?.trippedAt).toBeCloseTo(-0.4, 9);
		expect(bracket?.survivedAt).toBeCloseTo(1.2, 9);
		const sheet = emptyFigures();
		const last = contexts[3];
		if (last === undefined || bracket === undefined) throw new Error('a bracket expected');
		readHeadroom(last, sheet, [bracket]);
		// The middle is 0.4 °C; 3 °C less 0.5 K of slope.
		expect(sheet.figures['headroom.evapSaturation']).toBeCloseTo(2.1, 9);
	});

	it('is inverted where a held start went further, and then gives no headroom', () => {
		const contexts = [2, 0.5].map((least) => context(least));
		const brackets = learnBrackets(contexts, [tripped(kind), held]);
		expect(brackets[0]?.inverted).toBe(true);
		const sheet = emptyFigures();
		readHeadroom(context(3), sheet, brackets);
		expect(sheet.absent['headroom.evapSaturation']?.reason).toBe('cannot-tell');
	});

	it('learns from trips of the protection’s own kind only', () => {
		expect(learnBrackets([context(2)], [tripped('oil-flow')])).toEqual([]);
	});
});
