import { describe, expect, it } from 'vitest';
import { REFRIGERANTS } from '$lib/model/unit';
import table from '../../../../../fixtures/saturation/equation-of-state.json';
import handbook from '../../../../../fixtures/saturation/handbook.json';
import grid from '../../../../../fixtures/saturation/r134a-grid.json';
import { glide, saturationPressure, saturationSeries, saturationTemperature, type Side } from './saturation';

const kPa: Record<string, Record<string, number>> = table.kPa;

describe('saturation against outside figures', () => {
	// Source: full equations of state calculated with CoolProp 8.0.0 (fixtures/saturation/equation-of-state.json).
	it.each(Object.keys(kPa))('%s agrees with its equation of state', (key) => {
		const [name = '', side = 'dew'] = key.split(' ');
		const refrigerant = REFRIGERANTS.find((r) => r === name);
		if (refrigerant === undefined) throw new Error(`no refrigerant ${name}`);
		// The blends' ancillaries are coarser; the R-1234yf table is from a later equation than the curve.
		const coarse: Partial<Record<string, number>> = { 'R-407C': 0.003, 'R-410A': 0.003, 'R-1234yf': 0.002 };
		const tolerance = coarse[refrigerant] ?? 0.0006;
		for (const [celsius, expected] of Object.entries(kPa[key] ?? {})) {
			const p = saturationPressure(refrigerant, Number(celsius), side === 'bubble' ? 'bubble' : 'dew');
			expect(Math.abs((p ?? NaN) / expected - 1), `${key} at ${celsius} °C`).toBeLessThan(tolerance);
		}
	});

	// Source: grid points of the Modelica Standard Library's R-134a medium, from the Tillner-Roth and Baehr equation.
	it('R-134a agrees with the published grid', () => {
		expect(grid.pascalToKelvin.length).toBeGreaterThan(150);
		for (const [pascal = NaN, kelvin = NaN] of grid.pascalToKelvin) {
			const t = saturationTemperature('R-134a', pascal / 1000);
			expect(Math.abs((t ?? NaN) + 273.15 - kelvin)).toBeLessThan(0.01);
		}
	});

	// Source: Mechanical Engineers' Handbook (Kutz), vol. 4; an older correlation, up to 0.16 K apart.
	it('R-134a is near the handbook table', () => {
		for (const [bar = NaN, celsius = NaN] of handbook.r134aHandbook.barToCelsius) {
			expect(Math.abs((saturationTemperature('R-134a', bar * 100) ?? NaN) - celsius)).toBeLessThan(0.17);
		}
	});

	// Source: a second R-410A equation (IBPSA Modelica library), fitted to a producer's table.
	it('R-410A dew is near a second equation', () => {
		for (const [celsius = NaN, expected = NaN] of handbook.r410aSecondEquation.celsiusToKiloPascal) {
			expect(Math.abs((saturationPressure('R-410A', celsius) ?? NaN) / expected - 1)).toBeLessThan(0.0035);
		}
	});

	// Source: ASHRAE Fundamentals chapter 30, recalled.
	it('R-134a, R-22 and R-123 agree with recalled handbook values', () => {
		for (const name of ['R-134a', 'R-22', 'R-123'] as const) {
			for (const [celsius, expected] of Object.entries(handbook.fromMemory[name])) {
				expect(Math.abs((saturationPressure(name, Number(celsius)) ?? NaN) / expected - 1)).toBeLessThan(0.0003);
			}
		}
	});
});

describe('inversion', () => {
	it.each(REFRIGERANTS)('%s goes there and back on both sides', (refrigerant) => {
		for (const side of ['dew', 'bubble'] satisfies Side[]) {
			for (let celsius = -25; celsius <= 65; celsius += 2.5) {
				const p = saturationPressure(refrigerant, celsius, side);
				// The fits begin at −34 and −10 °C; what lies below is refused, not extrapolated.
				if (p === null) expect(refrigerant).toBe('R-514A');
				else expect(saturationTemperature(refrigerant, p, side)).toBeCloseTo(celsius, 6);
			}
		}
	});

	it('gives null off the curve and keeps gaps in a series', () => {
		expect(saturationTemperature('R-134a', 0)).toBeNull();
		expect(saturationTemperature('R-134a', 5000)).toBeNull();
		expect(saturationPressure('R-134a', 120)).toBeNull();
		const t = Float64Array.of(0, 1, 2, 3);
		const s = saturationSeries('R-134a', { t, v: Float64Array.of(349.6586, NaN, 349.6586, -5), logging: 'interval' });
		// 349.6586 kPa is 5 °C by the equation of state above.
		expect(s.v[0]).toBeCloseTo(5, 2);
		expect(s.v[1]).toBeNaN();
		expect(s.v[2]).toBeCloseTo(5, 2);
		expect(s.v[3]).toBeNaN();
		expect(s.t).toBe(t);
	});

	it('knows a glide', () => {
		expect(glide('R-134a', 400)).toBeCloseTo(0, 9);
		// The equation-of-state table has R-407C at 5 °C: dew 546.9 kPa; its bubble temperature there is 5 to 7 K lower.
		expect(glide('R-407C', 546.9)).toBeGreaterThan(5);
	});
});
