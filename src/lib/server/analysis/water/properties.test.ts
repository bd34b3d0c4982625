import { describe, expect, it } from 'vitest';
import { density, duty, freezePoint, specificHeat } from './properties';

describe('water properties', () => {
	// Source: IAPWS SR6-08, 0.1 MPa, 298.15 K.
	it('agrees with the liquid-water supplement at 25 °C', () => {
		expect(Math.abs(density(25) - 997.047013)).toBeLessThan(0.01);
		expect(Math.abs(specificHeat(25) / 4.18144618 - 1)).toBeLessThan(0.001);
	});

	// Source: IAPWS-95 at 1 atm.
	it.each([
		[5, 999.967, 4.205],
		[10, 999.703, 4.1952],
		[30, 995.65, 4.1798]
	])('agrees with IAPWS-95 at %d °C', (celsius, rho, cp) => {
		expect(Math.abs(density(celsius) - rho)).toBeLessThan(0.02);
		expect(Math.abs(specificHeat(celsius) / cp - 1)).toBeLessThan(0.001);
	});

	// Source: published values of the "500" of gpm × 500 × °F: 502.4 at 44, 500.4 at 60, 497.8 at 85 °F.
	it.each([
		[44, 502.4],
		[60, 500.4],
		[85, 497.8]
	])("gives the trade's factor at %d °F", (fahrenheit, factor) => {
		const celsius = (fahrenheit - 32) / 1.8;
		const btuPerHour = (density(celsius) * 0.0630901964e-3 * (specificHeat(celsius) / 1.8) * 3600) / 1.0550559;
		expect(Math.abs(btuPerHour - factor)).toBeLessThan(0.8);
	});

	// From memory, ±1.5 K: 30 % EG freezes near −15 °C, 30 % PG near −13 °C.
	it('knows freeze points', () => {
		expect(freezePoint()).toBe(0);
		expect(Math.abs(freezePoint({ kind: 'EG', percent: 30 }) + 15)).toBeLessThan(1.5);
		expect(Math.abs(freezePoint({ kind: 'PG', percent: 30 }) + 13)).toBeLessThan(1.5);
	});
});

describe('duty', () => {
	// Source: worked example 350 gpm × 500 × 21 °F = 306.25 tons, 1 ton = 3.5169 kW; the real factor is within 1 % of 500.
	it('agrees with the worked example', () => {
		const leaving = (44 - 32) / 1.8;
		const tons = duty(350 * 0.0630901964, leaving + 21 / 1.8, leaving) / 3.5169;
		expect(Math.abs(tons / 306.25 - 1)).toBeLessThan(0.006);
	});

	it('keeps a missing part missing', () => {
		expect(duty(NaN, 12, 7)).toBeNaN();
	});
});
