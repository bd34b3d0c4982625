import type { SeriesId, DerivedKey } from '$lib/model/signals';
import type { Protection, TripKind } from '$lib/model/start';
import type { LimitKey } from '$lib/model/unit';

/** How a protection is watched. */
export type Watch = {
	protection: Protection;
	/** The quantity it watches. */
	trace: SeriesId | DerivedKey;
	/** Its configured limit; the first that is set counts. */
	limits: readonly LimitKey[];
	/** 1: trips when the quantity falls to the limit; −1: when it rises to it. */
	side: 1 | -1;
	kind: TripKind;
	/** What a reader calls it. */
	words: string;
	/** Quantities a start has to build up first count only from here, s, when no bypass is set [ours]. */
	from: number;
};

/** Every protection whose headroom is watched (method.md, headroom). */
export const WATCHES: readonly Watch[] = [
	watch(
		'evapSaturation',
		'evapSaturation',
		['evapSaturationCutout'],
		1,
		'low-evaporator-saturation',
		'evaporator saturation'
	),
	watch('suctionPressure', 'evapPressure', ['suctionPressureCutout'], 1, 'low-suction-pressure', 'evaporator pressure'),
	watch('leavingWater', 'evapWaterOut', ['leavingWaterCutout', 'freezeLimit'], 1, 'low-leaving-water', 'leaving water'),
	watch('condSaturation', 'condSaturation', ['condSaturationCutout'], -1, 'high-condensing', 'condensing saturation'),
	watch('condPressure', 'condPressure', ['condPressureCutout'], -1, 'high-condensing', 'condenser pressure'),
	watch(
		'dischargeTemp',
		'dischargeTemp',
		['dischargeTempCutout'],
		-1,
		'high-discharge-temperature',
		'discharge temperature'
	),
	watch('oilTemp', 'oilTemp', ['oilTempCutout'], -1, 'high-oil-temperature', 'oil temperature'),
	// Before net oil pressure, which follows it down on machines whose oil the difference moves.
	watch(
		'systemDelta',
		'systemDelta',
		['systemDeltaCutout'],
		1,
		'low-pressure-difference',
		'system pressure difference',
		60
	),
	watch('oilNet', 'oilNet', ['oilNetCutout'], 1, 'oil-flow', 'net oil pressure', 30),
	watch('margin', 'margin', ['marginCutout'], 1, 'oil-flow', 'margin', 60),
	watch('windingTemp', 'windingTemp', ['windingTempCutout'], -1, 'motor-temperature', 'winding temperature')
];

function watch(
	protection: Protection,
	trace: Watch['trace'],
	limits: readonly LimitKey[],
	side: 1 | -1,
	kind: TripKind,
	words: string,
	from = 0
): Watch {
	return { protection, trace, limits, side, kind, words, from };
}
