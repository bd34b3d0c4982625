import type { UnitNature } from '$lib/model/unit';

type Fluid = NonNullable<UnitNature['evapFluid']>;
const WATER: Fluid = { kind: 'water', percent: 0 };

/**
 * Density of the chilled fluid, kg/m³, at a temperature, °C, near atmospheric pressure.
 * Water: Kell's ratio of polynomials (J. Chem. Eng. Data 20 (1975) 97, recalled; tested against IAPWS figures).
 * EG and PG by mass %: a straight addition of about 1.4 (EG) and 0.9 (PG) kg/m³ a percent at 20 °C, from memory, ±1 %.
 */
export function density(celsius: number, fluid: Fluid = WATER): number {
	const t = celsius;
	const top =
		999.83952 + t * (16.945176 + t * (-7.9870401e-3 + t * (-46.170461e-6 + t * (105.56302e-9 + t * -280.54253e-12))));
	const water = top / (1 + 16.87985e-3 * t);
	if (fluid.kind === 'water') return water;
	const each = fluid.kind === 'EG' ? 1.4 : 0.9;
	return water + fluid.percent * (each - 0.005 * (t - 20));
}

/**
 * Specific heat of the chilled fluid, kJ/(kg·K), at a temperature, °C.
 * Water: least-squares quartic through IAPWS-95 values at 1 atm; within 0.1 % from 1 to 60 °C.
 * EG and PG: falls with the mass % (from memory, ±2 %).
 */
export function specificHeat(celsius: number, fluid: Fluid = WATER): number {
	const t = celsius;
	const water = 4.2197133 + t * (-3.3492015e-3 + t * (1.0455269e-4 + t * (-1.4925909e-6 + t * 8.67408534e-9)));
	if (fluid.kind === 'water') return water;
	const x = fluid.percent;
	return water * (fluid.kind === 'EG' ? 1 - 0.004 * x - 5e-6 * x * x : 1 - 0.0022 * x - 1.6e-5 * x * x);
}

/**
 * Freeze point, °C. Water 0; EG and PG by mass %: −(a·x + b·x²) from memory, within about 1.5 K up to 50 %.
 */
export function freezePoint(fluid: Fluid = WATER): number {
	if (fluid.kind === 'water') return 0;
	const x = fluid.percent;
	return fluid.kind === 'EG' ? -(0.245 * x + 0.0087 * x * x) : -(0.2 * x + 0.0092 * x * x);
}

/**
 * Cooling duty, kW = flow (L/s) × density (kg/L) × cp (kJ/(kg·K)) × (entering − leaving, K).
 * Density is taken at the leaving water, cp at the mean of both. NaN in gives NaN out.
 */
export function duty(flow: number, entering: number, leaving: number, fluid: Fluid = WATER): number {
	return flow * (density(leaving, fluid) / 1000) * specificHeat((entering + leaving) / 2, fluid) * (entering - leaving);
}
