import { describe, expect, it } from 'vitest';
import type { SignalKey } from '$lib/model/signals';
import { context, readBack, sourceFile } from '../testing/harness';
import { IP_FIELDS, plantRows, SI_FIELDS, STAMPS, wideText, type Field } from '../testing/plant';
import type { Inspection } from '../types';
import { inspectLog } from './inspect-log';

/** Invented data: two days at five minutes. */
const ROWS = plantRows(Date.UTC(2025, 2, 3, 5), 2, 300);
const iso = (t: number) => STAMPS.iso(t, 'America/New_York');
const look = (fields: readonly Field[], change = {}) =>
	inspectLog([sourceFile('w.csv', wideText(ROWS, fields, iso))], context(change));
const guess = (i: Inspection, column: string) => i.columns.find((c) => c.column === column)?.guess;
const kinds = (i: Inspection) => i.problems.map((p) => p.kind);
const renamed = (fields: readonly Field[], names: Record<string, string>) =>
	fields.map(([n, v]): Field => [names[n] ?? n, v]);
const replaced = (fields: readonly Field[], name: string, value: Field[1]) =>
	fields.map(([n, v]): Field => [n, n === name ? value : v]);

/** What the plain columns are, for measuring. */
const TRUTH: Record<string, SignalKey> = {
	'Compressor Running': 'running',
	'Demand (%)': 'demand',
	'Slide Position (%)': 'capacity',
	'Motor Current (A)': 'motorCurrent',
	'Evaporator Saturation Temp (°F)': 'evapSaturation',
	'Evaporator Pressure (psig)': 'evapPressure',
	'Entering Chilled Water Temp (°F)': 'evapWaterIn',
	'Leaving Chilled Water Temp (°F)': 'evapWaterOut',
	'Condenser Saturation Temp (°F)': 'condSaturation',
	'Condenser Pressure (psig)': 'condPressure',
	'Entering Condenser Water Temp (°F)': 'condWaterIn',
	'Leaving Condenser Water Temp (°F)': 'condWaterOut',
	'Suction Temp (°F)': 'suctionTemp',
	'Discharge Temp (°F)': 'dischargeTemp',
	'Oil Temp (°F)': 'oilTemp',
	'Oil Pressure (psig)': 'oilPressure',
	'Expansion Valve (%)': 'valvePosition',
	Alarm: 'alarm'
};

describe('confidence', () => {
	it('is over 0.8 and right for plain names', async () => {
		const got = await look(IP_FIELDS);
		expect(got.columns.map((c) => [c.column, c.guess.signal])).toEqual(Object.entries(TRUTH));
		expect(Math.min(...got.columns.map((c) => c.guess.confidence))).toBeGreaterThan(0.8);
	});
	it('falls where every name is Point 1…n', async () => {
		const got = await look(IP_FIELDS.map(([, value], i): Field => [`Point ${i + 1}`, value]));
		expect(got.decision).toBe('needs-mapping');
		expect(Math.max(...got.columns.map((c) => c.guess.confidence))).toBeLessThan(0.5);
		expect(got.mapping.every((m) => m.signal === null)).toBe(true);
	});
	it('falls where the names are shuffled', async () => {
		const shares: number[] = [];
		for (const step of [5, 7, 11]) {
			const fields = IP_FIELDS.map(([name], i): Field => [
				name,
				IP_FIELDS[(i + step) % IP_FIELDS.length]?.[1] ?? (() => '')
			]);
			const got = await look(fields);
			shares.push(got.columns.filter((c) => c.guess.confidence >= 0.8).length / got.columns.length);
		}
		expect(Math.max(...shares)).toBeLessThan(0.5);
	});
});

describe('units of measure', () => {
	it('tells °F from °C by range where nothing says it', async () => {
		const bare = IP_FIELDS.map(([n, v]): Field => [n.replace(' (°F)', '').replace(' (psig)', ''), v]);
		const got = await look(bare);
		expect(got.decision).toBe('ready');
		expect(guess(got, 'Oil Temp')?.unitOfMeasure).toBe('degF');
		expect(guess(got, 'Evaporator Pressure')?.unitOfMeasure).toBe('psig');
		expect(got.choices.find((c) => c.key === 'temperature-unit')).toMatchObject({ chosen: 'degF', sure: true });
		expect(guess(await look(SI_FIELDS), 'Oil temp')?.unitOfMeasure).toBe('degC');
	});
	it('tells gauge from absolute by the logged saturation', async () => {
		const gauge = await look(SI_FIELDS);
		expect(guess(gauge, 'Evap press kPa')?.unitOfMeasure).toBe('kPag');
		const absolute = replaced(
			replaced(SI_FIELDS, 'Evap press kPa', (r) => r.evapKpa.toFixed(0)),
			'Cond press kPa',
			(r) => r.condKpa.toFixed(0)
		);
		expect(guess(await look(absolute), 'Evap press kPa')?.unitOfMeasure).toBe('kPa');
	});
	it('tells it by the water where no saturation is logged', async () => {
		const fields = SI_FIELDS.filter(([n]) => n !== 'SST' && n !== 'SCT');
		const got = await look(fields);
		expect(got.decision).toBe('ready');
		expect(guess(got, 'Evap press kPa')?.unitOfMeasure).toBe('kPag');
	});
	it('asks where neither is there, and takes the answer', async () => {
		const fields = SI_FIELDS.filter(([n]) => !['SST', 'SCT', 'LWT', 'EWT', 'ECWT', 'Cond LWT'].includes(n));
		const got = await look(fields);
		expect(got.decision).toBe('needs-mapping');
		expect(got.choices.find((c) => c.key === 'pressure')?.sure).toBe(false);
		const told = await look(fields, { answers: { pressure: 'absolute' } });
		expect(told.questions).toEqual([]);
		expect(guess(told, 'Evap press kPa')?.unitOfMeasure).toBe('kPa');
	});
	it('reads a percentage written 0 to 1', async () => {
		const fields = replaced(IP_FIELDS, 'Slide Position (%)', (r) => (r.capacity / 100).toFixed(3));
		const got = await readBack([sourceFile('w.csv', wideText(ROWS, fields, iso))]);
		const most = Math.max(...ROWS.map((r) => r.capacity));
		expect(Math.max(...got.series('capacity').v)).toBeCloseTo(most, 0);
	});
	it('keeps current in % of rated apart from amperes', async () => {
		const got = await look(renamed(IP_FIELDS, { 'Motor Current (A)': '% RLA' }));
		expect(guess(got, '% RLA')).toMatchObject({ signal: 'motorCurrent', unitOfMeasure: 'pctRated' });
	});
});

describe('columns that are not what they say', () => {
	it('finds one that repeats another', async () => {
		const fields = replaced(
			IP_FIELDS,
			'Condenser Saturation Temp (°F)',
			IP_FIELDS.find(([n]) => n.startsWith('Leaving Condenser'))?.[1] ?? (() => '')
		);
		const got = await look(fields);
		expect(kinds(got)).toContain('duplicate-column');
	});
	it('finds one that never moves', async () => {
		expect(kinds(await look(replaced(IP_FIELDS, 'Oil Temp (°F)', () => '98.6')))).toContain('dead-column');
	});
	it('finds entering and leaving swapped', async () => {
		const swapped = renamed(IP_FIELDS, {
			'Entering Chilled Water Temp (°F)': 'Leaving Chilled Water Temp (°F)',
			'Leaving Chilled Water Temp (°F)': 'Entering Chilled Water Temp (°F)'
		});
		const got = await look(swapped);
		expect(kinds(got)).toContain('swapped-columns');
		expect(guess(got, 'Leaving Chilled Water Temp (°F)')?.confidence).toBeLessThan(0.8);
	});
});

describe('questions', () => {
	it('asks which column tells when it runs', async () => {
		const got = await look(IP_FIELDS.filter(([n]) => !/Running|Current|Slide/.test(n)));
		expect(got.decision).toBe('needs-mapping');
		expect(got.questions.join()).toContain('when the compressor runs');
	});
	it('an unknown column never blocks', async () => {
		const got = await look([...IP_FIELDS, ['Operator initials', () => 'JK'], ['Zone temp', () => '71']]);
		expect(got.decision).toBe('ready');
		expect(got.mapping.filter((m) => m.signal === null)).toHaveLength(2);
	});
	it('remembers a shape for the sister unit too, and a shared file’s columns for their own units', async () => {
		const first = await look(IP_FIELDS);
		const mapping = first.columns.map((c) => ({ ...c.guess, confirmed: true }));
		const remembered = [{ headerSignature: first.headerSignature, mapping, choices: {} }];
		const sister = { unitId: 'unit-2', tag: 'CH-2', refrigerant: 'R-134a' as const, circuits: 1, ratedAmps: null };
		const [home] = [context().unit];
		const next = await look(IP_FIELDS, { unit: sister, siblings: [home], remembered });
		expect(new Set(next.mapping.map((m) => m.unitId))).toEqual(new Set(['unit-2']));
		const both = mapping.map((m, i) => (i % 2 === 0 ? m : { ...m, unitId: 'unit-2' }));
		const shared = await look(IP_FIELDS, { siblings: [sister], remembered: [{ ...remembered[0], mapping: both }] });
		expect(shared.mapping.map((m) => m.unitId)).toEqual(both.map((m) => m.unitId));
	});
	it('takes signals from another site, and units of measure from the log itself', async () => {
		const first = await look(SI_FIELDS);
		const fahrenheit = first.columns.map(({ guess: g }) => ({
			...g,
			unitOfMeasure: g.unitOfMeasure === 'degC' ? ('degF' as const) : g.unitOfMeasure,
			confirmed: true
		}));
		const mapping = fahrenheit.map((m) => (m.column === 'Oil temp' ? { ...m, signal: 'dischargeTemp' as const } : m));
		const shape = { headerSignature: first.headerSignature, mapping, choices: {} };
		const here = await look(SI_FIELDS, { remembered: [shape] });
		expect(guess(here, 'LWT')?.unitOfMeasure).toBe('degF');
		const there = await look(SI_FIELDS, { remembered: [{ ...shape, elsewhere: true }] });
		expect(guess(there, 'LWT')).toMatchObject({ signal: 'evapWaterOut', unitOfMeasure: 'degC', confirmed: true });
		expect(guess(there, 'Oil temp')?.signal).toBe('dischargeTemp');
	});
	it('asks on the page even when sure, but never twice for one header', async () => {
		const first = await look(IP_FIELDS, { ask: true });
		expect(first.decision).toBe('needs-mapping');
		const mapping = first.columns.map((c) => ({ ...c.guess, confirmed: true }));
		const odd = mapping.map((m) => (m.column === 'Suction Temp (°F)' ? { ...m, signal: 'liquidTemp' as const } : m));
		const remembered = [{ headerSignature: first.headerSignature, mapping: odd, choices: {} }];
		const text = wideText(ROWS.slice(50), IP_FIELDS, iso);
		const next = await inspectLog([sourceFile('next week.csv', text)], context({ ask: true, remembered }));
		expect(next.decision).toBe('ready');
		expect(guess(next, 'Suction Temp (°F)')).toMatchObject({
			signal: 'liquidTemp',
			confirmed: true,
			file: 'next week.csv'
		});
	});
});
