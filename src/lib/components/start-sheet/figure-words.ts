import { type MeasureKey, MEASURES, pageMeasure, type Quantity, type UnitSystem } from '$lib/model/quantities';
import { FIGURES, type FigureKey, type Protection } from '$lib/model/start';
import type { LimitKey } from '$lib/model/unit';
import type { Units } from '$lib/model/wire/common';
import { formatDuration, formatElapsed } from '$lib/utils/clock';
import { decimalsOf, formatNumber, withUnit } from '$lib/utils/format';

const SIGNED =
	/^(headroom\.|minMargin|maxMargin|settledMargin|marginSlope|oilTempSlope|liftAtStart|oilLiftAtStart|shift)/;
const MEASURE_KEYS = Object.keys(MEASURES) as MeasureKey[];

/** The unit of measure an answer prints a quantity in: by its `units`, else the person's. */
export function measureOf(quantity: Quantity, units: Units, system: UnitSystem): MeasureKey {
	const symbol = units[quantity];
	const usual = pageMeasure(quantity, system);
	if (symbol === undefined || symbol === MEASURES[usual].symbol) return usual;
	return MEASURE_KEYS.find((key) => MEASURES[key].symbol === symbol && MEASURES[key].quantity === quantity) ?? usual;
}

/** A value of an answer, already in its units, with its unit of measure: "−1.2 °F", "11 h 6 min". */
export function printValue(value: number, quantity: Quantity, units: Units, system: UnitSystem, sign = false): string {
	if (quantity === 'duration') return formatDuration(value);
	const measure = measureOf(quantity, units, system);
	const symbol = units[quantity] ?? MEASURES[measure].symbol;
	return withUnit(formatNumber(value, decimalsOf(measure), { sign }), symbol.replace(' diff.', ''));
}

/** A figure of a start as the sheet prints it. */
export function printFigure(key: FigureKey, value: number, units: Units, system: UnitSystem): string {
	if (key.endsWith('AtSeconds') || key.startsWith('timeTo')) return `${formatElapsed(value)} in`;
	if (key === 'degreeSecondsBelowCutout') return withUnit(formatNumber(value, 0), system === 'ip' ? '°F·s' : 'K·s');
	if (key === 'powerPerDuty') return withUnit(formatNumber(value, 2), system === 'ip' ? 'kW/ton' : 'kW/kW');
	if (key === 'secondsBelowCutout' || key === 'secondsAtValveLimit') return withUnit(formatNumber(value), 's');
	return printValue(value, FIGURES[key], units, system, SIGNED.test(key));
}

/** The limit a figure is read against. */
export const FIGURE_LIMITS: Readonly<Partial<Record<FigureKey, readonly LimitKey[]>>> = {
	startCapacity: ['startCapacityUsualLow', 'startCapacityUsualHigh'],
	peakCapacity: ['fullLoading'],
	condWaterInAtStart: ['condWaterLeast'],
	minEvapSaturation: ['evapSaturationCutout'],
	secondsBelowCutout: ['evapSaturationCutoutDelay'],
	degreeSecondsBelowCutout: ['cutoutDegreeSeconds'],
	minMargin: ['marginCutout'],
	settledMargin: ['lineRestrictionMargin'],
	maxOilTemp: ['oilTempCutout'],
	maxCondSaturation: ['condSaturationCutout'],
	evapApproach: ['evapApproachUsualHigh'],
	condApproach: ['condApproachUsualHigh'],
	superheat: ['superheatUsualLow', 'superheatUsualHigh'],
	minOilNet: ['oilNetCutout']
};

/** The limit behind each protection's headroom, and whether the protection is a low one. */
export const PROTECTION_LIMITS: Readonly<Record<Protection, LimitKey>> = {
	evapSaturation: 'evapSaturationCutout',
	suctionPressure: 'suctionPressureCutout',
	leavingWater: 'leavingWaterCutout',
	condSaturation: 'condSaturationCutout',
	condPressure: 'condPressureCutout',
	dischargeTemp: 'dischargeTempCutout',
	oilTemp: 'oilTempCutout',
	oilNet: 'oilNetCutout',
	systemDelta: 'systemDeltaCutout',
	margin: 'marginCutout',
	windingTemp: 'windingTempCutout'
};

/** Quantity of each limit, for printing it. */
export function limitQuantity(key: LimitKey): Quantity {
	if (/Pressure|CutoutPressure/.test(key) && key !== 'oilNetCutout') return 'pressure';
	if (key === 'oilNetCutout' || key === 'systemDeltaCutout') return 'pressureDifference';
	if (/margin|Approach|superheat|Tolerance|cutoutDegreeSeconds/i.test(key)) return 'temperatureDifference';
	if (/Window|Rest|Delay|Bypass|pumpLead/.test(key)) return 'duration';
	if (/Capacity|Loading|Band|currentLimit/.test(key)) return 'percent';
	return 'temperature';
}

/** Figures the sheet shows first, in the order of a start. */
export const TELLING_FIGURES: readonly FigureKey[] = [
	'startCapacity',
	'startAmps',
	'condWaterInAtStart',
	'waterOutAtStart',
	'oilTempAtStart',
	'liftAtStart',
	'minEvapSaturation',
	'steepestFall',
	'secondsBelowCutout',
	'peakCapacity',
	'maxValvePosition',
	'minSuperheat',
	'minMargin',
	'maxOilTemp',
	'evapApproach',
	'condApproach',
	'superheat',
	'settledDischargeSuperheat',
	'settledSubcooling',
	'settledMargin',
	'minOilNet',
	'systemDeltaAt60s',
	'pullDownRate'
];
