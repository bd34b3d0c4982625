import type { NamePlate } from '$lib/model/unit';

/** What stands in the fields of a name plate. */
export type PlateFields = Record<keyof NamePlate, string>;

/** A plate as its form shows it: what is not known is an empty field. */
export function plateFields(plate: NamePlate | undefined): PlateFields {
	const text = (value: string | number | null | undefined): string => (value ?? '').toString();
	return {
		serial: text(plate?.serial),
		year: text(plate?.year),
		place: text(plate?.place),
		charge: text(plate?.charge),
		oilGrade: text(plate?.oilGrade),
		oilCharge: text(plate?.oilCharge)
	};
}

/** A number as it is typed, with a decimal comma too; null for an empty field, NaN for what is none. */
const numberOf = (text: string): number | null => (text.trim() === '' ? null : Number(text.trim().replace(',', '.')));

/** What the API takes; a field that is no number comes out NaN, which the schema refuses beside it. */
export function plateInput(fields: PlateFields): NamePlate {
	const { serial, place, oilGrade } = fields;
	return {
		serial,
		place,
		oilGrade,
		year: numberOf(fields.year),
		charge: numberOf(fields.charge),
		oilCharge: numberOf(fields.oilCharge)
	};
}
