import { describe, expect, it } from 'vitest';
import { cellUnit, readCell, readNumber, type CellValue } from './cell';
import { isUnitCell, measuresFor, unitOf } from './units';
import { isNothing, isSentinel, runStateOf, stateOf } from './words';

const cell = (text: string, decimal: '.' | ',' = '.') => {
	const out: CellValue = { value: NaN, bad: null };
	readCell(text, decimal, out);
	return out.bad ?? out.value;
};

describe('readNumber', () => {
	// Hand-worked.
	it.each([
		['44.25', '.', 44.25],
		['-3', '.', -3],
		['1,234.5', '.', 1234.5],
		['1e3', '.', 1000],
		['.5', '.', 0.5],
		['44,25', ',', 44.25],
		['1.234,5', ',', 1234.5],
		['1 234,5', ',', 1234.5],
		['0.5', ',', 0.5]
	] as const)('%s with %s', (text, decimal, value) => expect(readNumber(text, decimal)).toBe(value));
	it('does not guess at what is no number', () => {
		expect(readNumber('44,25', '.')).toBeNaN();
		expect(readNumber('1.234', ',')).toBe(1234);
		expect(readNumber('1-2', '.')).toBeNaN();
	});
});

describe('readCell', () => {
	it.each([
		['', 'blank'],
		['  ', 'blank'],
		['---', 'dashes'],
		['NaN', 'word'],
		['#N/A', 'word'],
		['Comm Fail', 'word'],
		['=A1+B1', 'formula'],
		['71.2 {fault}', 'status'],
		['abc', 'unreadable'],
		['12abc', 'unreadable'],
		['71.2 {ok}', 71.2],
		['71.2 °F', 71.2],
		['71.2°F', 71.2],
		['350gpm', 350],
		['45 %', 45]
	])('%s', (text, expected) => expect(cell(text)).toBe(expected));
	it('knows the unit behind a number', () => {
		expect(cellUnit('71.2 °F')).toBe('°F');
		expect(cellUnit('12 apples')).toBe('');
	});
});

describe('unit words', () => {
	it.each([
		['°F', 'degF'],
		['deg C', 'degC'],
		['[psig]', 'psig'],
		['kPa(a)', 'kPa'],
		['m³/h', 'm3h'],
		['% RLA', 'pctRated'],
		['GPM', 'gpm']
	])('%s', (text, key) => expect(unitOf(text)?.[0]).toBe(key));
	it('keeps gauge and absolute open where the word does', () => {
		expect(measuresFor(unitOf('psi') ?? [], 'pressure')).toEqual(['psig', 'psia']);
		expect(measuresFor(unitOf('psi') ?? [], 'pressureDifference')).toEqual(['psid']);
		expect(unitOf('apples')).toBeNull();
		expect(isUnitCell('-')).toBe(true);
	});
});

describe('words', () => {
	it('tells on from off from neither', () => {
		expect([stateOf('ON'), stateOf(' stopped '), stateOf('auto')]).toEqual([1, 0, NaN]);
		expect([runStateOf('Running - Loaded'), runStateOf('Tripped'), runStateOf('Mode 3')]).toEqual([1, 0, NaN]);
	});
	it('knows markers of no reading', () => {
		expect(isNothing('No Data')).toBe(true);
		expect(isNothing('44')).toBe(false);
		expect(isSentinel(32767)).toBe(true);
		expect(isSentinel(44)).toBe(false);
	});
});
