import type { Refrigerant } from '$lib/model/unit';

/**
 * Dew pressure, kPa absolute, at 0, 20 and 50 °C: CoolProp 8.0.0's full equations of state (saturation-eos-table.json).
 * Three points are enough to tell gauge from absolute pressure, which is all this is for.
 */
const POINTS: Readonly<Partial<Record<Refrigerant, readonly [number, number, number]>>> = {
	'R-134a': [292.8032, 571.7069, 1317.9055],
	'R-1234ze(E)': [216.55, 427.3434, 997.2229],
	'R-1234yf': [315.8805, 591.8361, 1302.3493],
	'R-22': [497.9879, 910.0184, 1942.6884],
	'R-123': [32.6451, 75.6097, 212.4629],
	'R-410A': [798.0536, 1442.9766, 3062.8273],
	'R-407C': [460.7132, 880.3392, 1987.7687],
	'R-513A': [323.1764, 613.6298, 1369.6374]
};
const KELVIN = [273.15, 293.15, 323.15] as const;

/**
 * Saturation temperature (°C, dew) of a pressure (kPa absolute), or null when the refrigerant is not in the table or the
 * pressure is not above zero. 1/T is taken as quadratic in ln p through three points: within 0.3 K from −15 to 60 °C.
 */
export function roughSaturation(refrigerant: Refrigerant, pressure: number): number | null {
	const p = POINTS[refrigerant];
	if (!p || !(pressure > 0)) return null;
	const x = Math.log(pressure);
	const [a, b, c] = [Math.log(p[0]), Math.log(p[1]), Math.log(p[2])];
	const inverse =
		(((x - b) * (x - c)) / ((a - b) * (a - c))) * (1 / KELVIN[0]) +
		(((x - a) * (x - c)) / ((b - a) * (b - c))) * (1 / KELVIN[1]) +
		(((x - a) * (x - b)) / ((c - a) * (c - b))) * (1 / KELVIN[2]);
	return 1 / inverse - 273.15;
}
