/**
 * Quantities, the one unit each is stored in, and the units people and files write them in.
 * Stored: °C, K for differences, kPa absolute, kPa for differences, L/s, kW, %, Hz, A, V, s, h, mm.
 */

export const QUANTITIES = [
	'temperature',
	'temperatureDifference',
	'pressure',
	'pressureDifference',
	'flow',
	'power',
	'duty',
	'percent',
	'frequency',
	'current',
	'voltage',
	'duration',
	'temperatureRate',
	'count',
	'hours',
	'state',
	'text'
] as const;
export type Quantity = (typeof QUANTITIES)[number];

/** How a stored value becomes `factor * stored + offset` in a unit of measure. */
export type Measure = {
	/** As printed: `°F`, `kPa gauge`. */
	symbol: string;
	quantity: Quantity;
	factor: number;
	offset: number;
	/** Gauge units are read against the site's own air pressure, so their offset is added there. */
	gauge?: boolean;
};

const KPA_PER_PSI = 6.894757293168361;
const LPS_PER_GPM = 0.0630901964;
const KW_PER_TON = 3.5168528420667;

const list = [
	['degC', '°C', 'temperature', 1, 0],
	['degF', '°F', 'temperature', 1.8, 32],
	['K', 'K', 'temperatureDifference', 1, 0],
	['degFdiff', '°F diff.', 'temperatureDifference', 1.8, 0],
	['kPa', 'kPa', 'pressure', 1, 0],
	['kPag', 'kPa gauge', 'pressure', 1, 0],
	['bar', 'bar', 'pressure', 0.01, 0],
	['barg', 'bar gauge', 'pressure', 0.01, 0],
	['MPa', 'MPa', 'pressure', 0.001, 0],
	['psia', 'psia', 'pressure', 1 / KPA_PER_PSI, 0],
	['psig', 'psig', 'pressure', 1 / KPA_PER_PSI, 0],
	['inHg', 'inHg', 'pressure', 0.295299830714, 0],
	['kPad', 'kPa', 'pressureDifference', 1, 0],
	['bard', 'bar', 'pressureDifference', 0.01, 0],
	['psid', 'psi', 'pressureDifference', 1 / KPA_PER_PSI, 0],
	['lps', 'L/s', 'flow', 1, 0],
	['gpm', 'gpm', 'flow', 1 / LPS_PER_GPM, 0],
	['m3h', 'm³/h', 'flow', 3.6, 0],
	['kW', 'kW', 'power', 1, 0],
	['W', 'W', 'power', 1000, 0],
	['kWduty', 'kW', 'duty', 1, 0],
	['tons', 'tons', 'duty', 1 / KW_PER_TON, 0],
	['pct', '%', 'percent', 1, 0],
	['frac', '0 to 1', 'percent', 0.01, 0],
	['Hz', 'Hz', 'frequency', 1, 0],
	['rpm', 'rpm', 'frequency', 60, 0],
	['A', 'A', 'current', 1, 0],
	['pctRated', '% rated', 'current', 1, 0],
	['V', 'V', 'voltage', 1, 0],
	['s', 's', 'duration', 1, 0],
	['Kpm', 'K/min', 'temperatureRate', 1, 0],
	['degFpm', '°F/min', 'temperatureRate', 1.8, 0],
	['Kph', 'K/h', 'temperatureRate', 1, 0],
	['degFph', '°F/h', 'temperatureRate', 1.8, 0],
	['count', '', 'count', 1, 0],
	['h', 'h', 'hours', 1, 0],
	['onoff', 'on/off', 'state', 1, 0],
	['text', 'text', 'text', 1, 0]
] as const;

export type MeasureKey = (typeof list)[number][0];
const GAUGE: ReadonlySet<string> = new Set(['kPag', 'barg', 'psig', 'inHg']);

export const MEASURES: Readonly<Record<MeasureKey, Measure>> = Object.fromEntries(
	list.map(([key, symbol, quantity, factor, offset]) => [
		key,
		{ symbol, quantity, factor, offset, ...(GAUGE.has(key) ? { gauge: true } : {}) }
	])
) as Record<MeasureKey, Measure>;

/** Is `key` one of {@link MEASURES}? */
export function isMeasureKey(key: string): key is MeasureKey {
	return key in MEASURES;
}

/**
 * Air pressure at a site, kPa absolute, of the standard atmosphere: 101.325·(1 − 2.25577e-5·h)^5.25588, h in m.
 * @throws RangeError when the altitude is not between −500 and 9,000 m
 */
export function airPressure(altitude: number): number {
	if (!(altitude >= -500 && altitude <= 9000))
		throw new RangeError(`altitude ${altitude} m is outside −500 to 9,000 m`);
	return 101.325 * (1 - 2.25577e-5 * altitude) ** 5.25588;
}

/** A stored value in a unit of measure. Gauge units subtract `air` (kPa absolute). */
export function fromStored(value: number, key: MeasureKey, air = 101.325): number {
	const m = MEASURES[key];
	return m.factor * (m.gauge ? value - air : value) + m.offset;
}

/** A value in a unit of measure as it is stored. Gauge units add `air` (kPa absolute). */
export function toStored(value: number, key: MeasureKey, air = 101.325): number {
	const m = MEASURES[key];
	const stored = (value - m.offset) / m.factor;
	return m.gauge ? stored + air : stored;
}

/** The two systems a person chooses between. Pages show gauge pressure, the API absolute. */
export type UnitSystem = 'si' | 'ip';

type SystemMeasures = Readonly<Partial<Record<Quantity, MeasureKey>>>;
const PAGE: Readonly<Record<UnitSystem, SystemMeasures>> = {
	si: {
		temperature: 'degC',
		temperatureDifference: 'K',
		pressure: 'kPag',
		pressureDifference: 'kPad',
		flow: 'lps',
		duty: 'kWduty',
		temperatureRate: 'Kpm'
	},
	ip: {
		temperature: 'degF',
		temperatureDifference: 'degFdiff',
		pressure: 'psig',
		pressureDifference: 'psid',
		flow: 'gpm',
		duty: 'tons',
		temperatureRate: 'degFpm'
	}
};
const COMMON: SystemMeasures = {
	power: 'kW',
	percent: 'pct',
	frequency: 'Hz',
	current: 'A',
	voltage: 'V',
	duration: 's',
	count: 'count',
	hours: 'h',
	state: 'onoff',
	text: 'text'
};

/** The unit of measure a quantity is shown in on pages. */
export function pageMeasure(quantity: Quantity, system: UnitSystem): MeasureKey {
	return PAGE[system][quantity] ?? COMMON[quantity] ?? 'count';
}

/** The unit of measure a quantity has in API answers: as on pages, but pressures absolute. */
export function apiMeasure(quantity: Quantity, system: UnitSystem): MeasureKey {
	if (quantity === 'pressure') return system === 'ip' ? 'psia' : 'kPa';
	return pageMeasure(quantity, system);
}
