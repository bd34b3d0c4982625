import type { Refrigerant } from '$lib/model/unit';

/**
 * One saturation curve: p = reducingPressure · exp[(T_r/T) · Σ nᵢ·θ^tᵢ], θ = 1 − T/T_r, T in K, p in Pa absolute.
 * `least` and `most` bound T, K.
 */
export type SaturationCurve = {
	readonly reducingTemperature: number;
	readonly reducingPressure: number;
	readonly n: readonly number[];
	readonly exponent: readonly number[];
	readonly least: number;
	readonly most: number;
};

/** Both sides of a refrigerant's two-phase region; a pure fluid has one curve on both. */
export type SaturationCurves = {
	readonly dew: SaturationCurve;
	readonly bubble: SaturationCurve;
	readonly source: string;
};

/*
 * Coefficients: CoolProp fluid files, commit ea27c639 (R-1234yf: commit 29a2d7df).
 * MIT licence, Copyright (c) 2012-2018 Ian H. Bell and other CoolProp developers.
 * R-513A and R-514A are least-squares fits of the same form to the mixture equations of state.
 */
const R134a: SaturationCurve = {
	reducingTemperature: 374.21,
	reducingPressure: 4059280,
	n: [
		0.4331478287291047, -9.090302559074352, 2.1476074125217703, -1.557687007603464, -3.5020328972698604,
		14.958442337201044
	],
	exponent: [0.845, 0.99, 1.14, 2.651, 4.507, 17.235],
	least: 169.85,
	most: 374.2
};
const R1234zeE: SaturationCurve = {
	reducingTemperature: 382.52,
	reducingPressure: 3636250,
	n: [
		-0.0007362365256237661, -7.554649594027046, 1.7584756226770677, -2.0617331468344315, -0.9980943477495106,
		-3.038350758700181
	],
	exponent: [0.052000000000000005, 1, 1.5, 2.3333333333333335, 4.333333333333333, 4.833333333333333],
	least: 168.62,
	most: 382.51
};
const R1234yf: SaturationCurve = {
	reducingTemperature: 367.85,
	reducingPressure: 3382200,
	n: [
		0.21867168915151047, -6.7020534970313275, -3.9344883544124443, 39309.745547798695, 18.183182049398066,
		-3883.103380695622
	],
	exponent: [0.728, 0.961, 3.78, 17.277, 7.967, 14.02],
	least: 220.0,
	most: 367.84
};
const R123: SaturationCurve = {
	reducingTemperature: 456.831,
	reducingPressure: 3672000,
	n: [
		0.021700046705144468, -0.017071666294105076, -0.8684522136311831, -5.704783724754201, -4.177439664066626,
		-5.641903122742188
	],
	exponent: [0.10400000000000001, 0.052000000000000005, 0.8333333333333334, 1, 3.8333333333333335, 14.666666666666666],
	least: 166.0,
	most: 456.82
};
const R22: SaturationCurve = {
	reducingTemperature: 369.295,
	reducingPressure: 4990000,
	n: [
		-7.2670371701641265, 1.2860929616388512, -0.10790119794275199, -0.989473291657183, -2.9393096353041623,
		0.488431917326884
	],
	exponent: [0.999, 1.272, 1.692, 2.74, 4.539, 15.876],
	least: 150.0,
	most: 369.29
};

/** Saturation curves of every refrigerant offered. */
export const SATURATION_CURVES: Readonly<Record<Refrigerant, SaturationCurves>> = {
	'R-134a': { dew: R134a, bubble: R134a, source: 'Tillner-Roth and Baehr, J. Phys. Chem. Ref. Data 23 (1994) 657' },
	'R-1234ze(E)': { dew: R1234zeE, bubble: R1234zeE, source: 'Thol and Lemmon, Int. J. Thermophys. 37 (2016)' },
	'R-1234yf': {
		dew: R1234yf,
		bubble: R1234yf,
		source:
			'Richter et al., J. Chem. Eng. Data (2011); the 2011 curve, since the newer one disagrees with its own equation of state'
	},
	'R-513A': {
		dew: {
			reducingTemperature: 369,
			reducingPressure: 3700000,
			n: [-7.5960664683927686, 2.0276520556311404, -2.8124813887412268, -2.7031378028578956],
			exponent: [1, 1.5, 2.5, 5],
			least: 238.15,
			most: 368.99
		},
		bubble: {
			reducingTemperature: 369,
			reducingPressure: 3700000,
			n: [-7.577180729053481, 1.9630022778275824, -2.707897121717084, -2.157247751562803],
			exponent: [1, 1.5, 2.5, 5],
			least: 238.15,
			most: 368.99
		},
		source: 'fit to the mixture equations of state'
	},
	'R-514A': {
		dew: {
			reducingTemperature: 451,
			reducingPressure: 3500000,
			n: [-7.833163809786148, 2.020264613399724, -2.6109661498484735, -4.672447966904691],
			exponent: [1, 1.5, 2.5, 5],
			least: 263.15,
			most: 450.99
		},
		bubble: {
			reducingTemperature: 451,
			reducingPressure: 3500000,
			n: [-7.873133759189768, 2.19224342430588, -2.9909026244378136, -3.5478699783176846],
			exponent: [1, 1.5, 2.5, 5],
			least: 263.15,
			most: 450.99
		},
		source: 'fit to the mixture equations of state, approximate'
	},
	'R-123': { dew: R123, bubble: R123, source: 'Younglove and McLinden, J. Phys. Chem. Ref. Data 23 (1994) 731' },
	'R-22': { dew: R22, bubble: R22, source: 'Kamei et al., Int. J. Thermophys. 16 (1995) 1155' },
	'R-410A': {
		dew: {
			reducingTemperature: 344.494,
			reducingPressure: 4901200,
			n: [-7.4411, 1.9883, -2.4925, -3.2633],
			exponent: [1, 1.6, 2.4, 5],
			least: 200.0,
			most: 344.48
		},
		bubble: {
			reducingTemperature: 344.494,
			reducingPressure: 4901200,
			n: [-7.2818, 2.5093, -3.2695, -2.8022],
			exponent: [1, 1.8, 2.4, 4.9],
			least: 200.0,
			most: 344.48
		},
		source: 'Lemmon, Int. J. Thermophys. 24 (2003) 991'
	},
	'R-407C': {
		dew: {
			reducingTemperature: 359.345,
			reducingPressure: 4631700,
			n: [-0.086077, -6.6364, -2.4648, -3.4776],
			exponent: [0.4, 0.965, 3.1, 5],
			least: 200.0,
			most: 359.34
		},
		bubble: {
			reducingTemperature: 359.345,
			reducingPressure: 4631700,
			n: [0.48722, -6.6959, -1.4165, -2.5109],
			exponent: [0.54, 0.925, 2.7, 4.7],
			least: 200.0,
			most: 359.34
		},
		source: 'Lemmon, Int. J. Thermophys. 24 (2003) 991'
	}
};
