import type { Series } from '$lib/model/series';
import type { Refrigerant } from '$lib/model/unit';
import { SATURATION_CURVES, type SaturationCurve } from './curves';

export type Side = 'dew' | 'bubble';

const KELVIN = 273.15;

/** ln(p/p_r) of a curve and its slope d ln p / dT, 1/K, at T in K. */
function logPressure(curve: SaturationCurve, kelvin: number): { value: number; slope: number } {
	const tau = curve.reducingTemperature / kelvin;
	const theta = 1 - 1 / tau;
	let sum = 0;
	let derivative = 0;
	for (let i = 0; i < curve.n.length; i++) {
		const exponent = curve.exponent[i] ?? 0;
		const term = (curve.n[i] ?? 0) * theta ** exponent;
		sum += term;
		derivative += (exponent * term) / theta;
	}
	return { value: tau * sum, slope: -(tau * sum) / kelvin - derivative / kelvin };
}

/**
 * Saturation pressure, kPa absolute, at a temperature, °C.
 * p = p_r · exp[(T_r/T) · Σ nᵢ·θ^tᵢ], θ = 1 − T/T_r (source: see curves.ts). NaN in gives NaN out.
 * @returns null outside the curve's range
 */
export function saturationPressure(refrigerant: Refrigerant, celsius: number, side: Side = 'dew'): number | null {
	const curve = SATURATION_CURVES[refrigerant][side];
	const kelvin = celsius + KELVIN;
	if (Number.isNaN(kelvin)) return NaN;
	if (kelvin < curve.least || kelvin > curve.most) return null;
	return (curve.reducingPressure * Math.exp(logPressure(curve, kelvin).value)) / 1000;
}

/** Newton's method on ln p, which is nearly straight in 1/T; `guess` in K. NaN when the pressure is off the curve. */
function invert(curve: SaturationCurve, kiloPascal: number, guess: number): number {
	const target = Math.log((kiloPascal * 1000) / curve.reducingPressure);
	if (!(target < logPressure(curve, curve.most).value)) return NaN;
	let kelvin = guess;
	for (let i = 0; i < 30; i++) {
		const { value, slope } = logPressure(curve, kelvin);
		const step = (target - value) / slope;
		kelvin = Math.min(Math.max(kelvin + step, curve.least), curve.most);
		if (Math.abs(step) < 1e-7) return kelvin;
	}
	return NaN;
}

/**
 * Saturation temperature, °C, at a pressure, kPa absolute: the inverse of {@link saturationPressure}.
 * @returns null when the pressure is not above zero or lies off the curve
 */
export function saturationTemperature(refrigerant: Refrigerant, kiloPascal: number, side: Side = 'dew'): number | null {
	if (!(kiloPascal > 0)) return null;
	const curve = SATURATION_CURVES[refrigerant][side];
	const kelvin = invert(curve, kiloPascal, curve.reducingTemperature * 0.75);
	return Number.isNaN(kelvin) ? null : kelvin - KELVIN;
}

/** Dew minus bubble temperature at a pressure, K; null off the curves. Zero for a pure fluid. */
export function glide(refrigerant: Refrigerant, kiloPascal: number): number | null {
	const dew = saturationTemperature(refrigerant, kiloPascal, 'dew');
	const bubble = saturationTemperature(refrigerant, kiloPascal, 'bubble');
	return dew === null || bubble === null ? null : dew - bubble;
}

/**
 * A saturation series, °C, from a pressure series, kPa absolute, on the same times.
 * A reading off the curve or NaN stays NaN. Each inversion starts from the one before, so it takes a step or two.
 */
export function saturationSeries(refrigerant: Refrigerant, pressure: Series, side: Side = 'dew'): Series {
	const curve = SATURATION_CURVES[refrigerant][side];
	const start = curve.reducingTemperature * 0.75;
	const v = new Float64Array(pressure.v.length);
	let lastPressure = NaN;
	let lastKelvin = start;
	for (let i = 0; i < v.length; i++) {
		const p = pressure.v[i] ?? NaN;
		if (p !== lastPressure) {
			lastPressure = p;
			const guess = Number.isNaN(lastKelvin) ? start : lastKelvin;
			lastKelvin = p > 0 ? invert(curve, p, guess) : NaN;
		}
		v[i] = lastKelvin - KELVIN;
	}
	return { t: pressure.t, v, logging: pressure.logging };
}
