import {
	fromStored,
	MEASURES,
	pageMeasure,
	type MeasureKey,
	type Quantity,
	type UnitSystem
} from '$lib/model/quantities';

/** Decimals a quantity is spoken with; whole numbers where a tenth says nothing. */
const DECIMALS: Partial<Record<Quantity, number>> = {
	temperature: 1,
	temperatureDifference: 1,
	temperatureRate: 2,
	flow: 1
};

/** A difference is spoken with the plain symbol: "5.4 °F", not "5.4 °F diff.". */
const spoken = (key: MeasureKey) => (key === 'degFdiff' ? '°F' : MEASURES[key].symbol);

/**
 * A stored value in the person's units, as it stands in a sentence: "41.2 °F", "63 %", "74 s", "−3.1 K".
 * Absent values are "no reading".
 */
export function quantityWords(value: number | null, quantity: Quantity, system: UnitSystem): string {
	if (value === null || !Number.isFinite(value)) return 'no reading';
	const key = pageMeasure(quantity, system);
	const shown = fromStored(value, key).toFixed(DECIMALS[quantity] ?? 0);
	const number = /^-0(\.0*)?$/.test(shown) ? shown.slice(1) : shown.replace('-', '−');
	const symbol = spoken(key);
	return symbol === '' ? number : `${number} ${symbol}`;
}

/** What sentences are written with: one short function per quantity, in one person's units. */
export type Words = {
	system: UnitSystem;
	temperature: (value: number | null) => string;
	difference: (value: number | null) => string;
	percent: (value: number | null) => string;
	seconds: (value: number | null) => string;
	pressureDifference: (value: number | null) => string;
	flow: (value: number | null) => string;
	of: (value: number | null, quantity: Quantity) => string;
};

/** The words of one unit system. */
export function wordsFor(system: UnitSystem): Words {
	const of = (value: number | null, quantity: Quantity) => quantityWords(value, quantity, system);
	return {
		system,
		of,
		temperature: (value) => of(value, 'temperature'),
		difference: (value) => of(value, 'temperatureDifference'),
		percent: (value) => of(value, 'percent'),
		seconds: (value) => of(value, 'duration'),
		pressureDifference: (value) => of(value, 'pressureDifference'),
		flow: (value) => of(value, 'flow')
	};
}

/** "1 start", "3 starts". */
export function countWords(count: number, one: string, many = `${one}s`): string {
	return `${count} ${count === 1 ? one : many}`;
}

/** "a", "a and b", "a, b and c". */
export function listWords(items: readonly string[]): string {
	if (items.length < 2) return items.join('');
	return `${items.slice(0, -1).join(', ')} and ${items.at(-1) ?? ''}`;
}

/**
 * A chance as people say it: "about 1 time in 30"; over one half: "more often than not".
 * @throws RangeError when p is outside 0…1
 */
export function chanceWords(p: number): string {
	if (!(p >= 0 && p <= 1)) throw new RangeError(`${p} is no chance`);
	if (p > 0.5) return 'more often than not';
	if (p < 1e-6) return 'less than 1 time in a million';
	const times = 1 / p;
	const step = times < 20 ? 1 : 10 ** (Math.floor(Math.log10(times)) - 1);
	return `about 1 time in ${(Math.round(times / step) * step).toLocaleString('en-US')}`;
}
