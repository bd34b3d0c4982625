import { describe, expect, it } from 'vitest';
import { asks, hindrances, mappingBody, mappingTitle, measureOptions, withSignal, type Row } from './mapping-edit';

// Invented columns.
function row(
	column: string,
	signal: string | null,
	over: Partial<Row['entry']> = {},
	role: Row['column']['role'] = 'signal'
): Row {
	const entry = {
		file: 'a.csv',
		column,
		signal: signal as Row['entry']['signal'],
		unitId: 'u',
		circuit: '1',
		unitOfMeasure: null,
		confidence: 0.9,
		confirmed: false,
		...over
	};
	return {
		entry,
		touched: false,
		column: { file: 'a.csv', column, role, guess: entry, reasons: [], range: null, trace: [], cells: [] }
	};
}

describe('asks', () => {
	it('asks below 0.8 only, of signals only, and once', () => {
		expect(asks(row('w1', 'condWaterIn', { confidence: 0.7 }))).toBe(true);
		expect(asks(row('w1', 'condWaterIn', { confidence: 0.7, confirmed: true }))).toBe(false);
		expect(asks({ ...row('w1', 'condWaterIn', { confidence: 0.7 }), touched: true })).toBe(false);
		expect(asks(row('spare', null, { confidence: 0.1 }))).toBe(false);
		expect(asks(row('t', null, { confidence: 0.5 }, 'time'))).toBe(false);
	});
});

describe('choosing a signal', () => {
	it('keeps a unit of measure that fits, and drops one that does not', () => {
		const entry = row('x', 'evapWaterOut', { unitOfMeasure: 'degF' }).entry;
		expect(withSignal(entry, 'condWaterIn').unitOfMeasure).toBe('degF');
		expect(withSignal(entry, 'evapPressure').unitOfMeasure).toBe('kPa');
		expect(withSignal(entry, '').signal).toBeNull();
	});
	it('offers only measures of the quantity', () => {
		expect(measureOptions('evapWaterOut').map((o) => o.value)).toEqual(['degC', 'degF']);
		expect(measureOptions(null)).toEqual([{ value: '', label: 'none' }]);
	});
});

describe('hindrances', () => {
	it('wants one column that tells running', () => {
		expect(hindrances([row('a', 'evapWaterOut')])[0]).toContain('when the compressor runs');
		expect(hindrances([row('a', 'power')])).toEqual([]);
	});
	it('names two columns taken for one signal, but lets phases be several', () => {
		expect(hindrances([row('p', 'power'), row('a', 'oilTemp'), row('b', 'oilTemp')])).toEqual([
			'“a” and “b” are taken for the same signal.'
		]);
		expect(hindrances([row('p', 'power'), row('a', 'phaseCurrents'), row('b', 'phaseCurrents')])).toEqual([]);
		expect(hindrances([row('p', 'power'), row('a', 'oilTemp'), row('b', 'oilTemp', { circuit: '2' })])).toEqual([]);
	});
});

describe('mappingTitle and mappingBody', () => {
	it('says what is to be done', () => {
		expect(mappingTitle({ state: 'needs-mapping', name: 'a' }, 2)).toBe(
			'2 columns wait for your word before starts are found'
		);
		expect(mappingTitle({ state: 'needs-mapping', name: 'a' }, 0)).toBe('Every column has its word: find the starts');
		expect(mappingTitle({ state: 'ready', name: 'a' }, 0, { all: 3, tripped: 1 })).toBe(
			'a is read: 3 starts, 1 tripped'
		);
		expect(mappingTitle({ state: 'ready', name: 'a' }, 0, { all: 0, tripped: 0 })).toBe('a is read: no start in it');
		expect(mappingTitle({ state: 'refused', name: 'a.csv' }, 0)).toBe('a.csv could not be read');
	});
	it('sends every column but time, confirmed', () => {
		const body = mappingBody([row('t', null, {}, 'time'), row('p', 'power')], 'UTC', { order: 'day' });
		expect(body.mapping).toHaveLength(1);
		expect(body.mapping[0]?.confirmed).toBe(true);
		expect(body.choices).toEqual({ order: 'day' });
		expect(body.timeZone).toBe('UTC');
		expect(mappingBody([], null, {})).toEqual({ mapping: [], choices: {} });
	});
});
