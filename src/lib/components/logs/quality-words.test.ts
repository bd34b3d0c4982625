import { describe, expect, it } from 'vitest';
import type { Log } from '$lib/model/wire/log';
import { loggingAdvice, shareOf, smallestEvent, stripOf } from './quality-words';

// Invented.
const layout = (intervalSeconds: number | null) => ({ intervalSeconds }) as Log['layout'];
const mapped = (...signals: string[]) => signals.map((signal) => ({ signal })) as Log['mapping'];
const ALL = ['running', 'capacity', 'demand', 'evapPressure', 'condSaturation', 'evapWaterOut'];
const REST = ['condWaterIn', 'oilTemp', 'valvePosition', 'motorCurrent', 'alarm'];

describe('loggingAdvice', () => {
	it('asks nothing of a log that has it all, closely enough', () => {
		expect(loggingAdvice({ layout: layout(5), mapping: mapped(...ALL, ...REST) })).toEqual([]);
	});
	it('names the signals that would tell, and the spacing', () => {
		const advice = loggingAdvice({ layout: layout(120), mapping: mapped('running', 'evapPressure', 'evapWaterOut') });
		expect(advice[0]).toMatch(/every 5 s.*2.min.*without an alarm/);
		expect(advice[1]).toMatch(/oil temperature/);
		expect(advice[1]).not.toMatch(/evaporator saturation/);
	});
	it('says nothing of a list of alarms', () => {
		expect(loggingAdvice({ layout: layout(null), mapping: [] })).toEqual([]);
	});
});

describe('smallestEvent', () => {
	it('is one row, or cannot be told', () => {
		expect(smallestEvent({ layout: layout(15) })).toMatch(/^15.s, one row/);
		expect(smallestEvent({ layout: null })).toMatch(/cannot/);
	});
});

describe('stripOf', () => {
	it('lays stretches on the window, slivers at least a pixel wide', () => {
		const window = { from: 1000, to: 2000 };
		const covered = [
			{ from: 1000, to: 1500 },
			{ from: 1900, to: 1900 }
		];
		expect(stripOf(covered, window, 200)).toEqual([
			{ x: 0, width: 100 },
			{ x: 180, width: 1 }
		]);
		expect(shareOf(covered, window)).toBe(0.5);
	});
});
