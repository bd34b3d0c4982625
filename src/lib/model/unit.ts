import { z } from 'zod';

/** Refrigerants offered, by ASHRAE 34 number. */
export const REFRIGERANTS = [
	'R-134a',
	'R-1234ze(E)',
	'R-1234yf',
	'R-513A',
	'R-514A',
	'R-123',
	'R-22',
	'R-410A',
	'R-407C'
] as const;
export const refrigerantSchema = z.enum(REFRIGERANTS);
export type Refrigerant = z.infer<typeof refrigerantSchema>;

const percentField = z.number().min(0).max(150).nullable();

const flowCurveSchema = z.array(z.object({ drop: z.number().positive(), flow: z.number().positive() })).max(8);
/** Points of a shell's curve: pressure drop kPa, flow L/s. */
export type FlowCurve = z.infer<typeof flowCurveSchema>;

/** Water, or ethylene or propylene glycol with its share in %; plain "water" is taken too. */
const fluidSchema = z.preprocess(
	(value) => (typeof value === 'string' ? { kind: value, percent: 0 } : value),
	z.object({ kind: z.enum(['water', 'EG', 'PG']), percent: z.number().min(0).max(60).default(0) })
);

/** What kind of machine a unit is: decides which figures, clues and defaults apply. Everything may be unknown (null). */
export const natureSchema = z
	.object({
		evaporator: z.enum(['flooded', 'falling-film', 'dx']).nullable(),
		condenser: z.enum(['water', 'air', 'evaporative']).nullable(),
		metering: z.enum(['electronic-valve', 'thermostatic-valve', 'orifice', 'level']).nullable(),
		compressor: z.enum(['screw', 'scroll', 'reciprocating', 'centrifugal']).nullable(),
		capacityControl: z.enum(['slide', 'steps', 'speed', 'vanes']).nullable(),
		slideActuation: z.enum(['oil-both-ways', 'spring-unload', 'gas', 'unknown']).nullable(),
		starter: z.enum(['wye-delta', 'solid-state', 'across-line', 'drive', 'unknown']).nullable(),
		/** seconds from the start to the starter's transition */
		starterTransition: z.number().min(0).max(120).nullable(),
		ratedAmps: z.number().positive().nullable(),
		startsPerHour: z.number().positive().nullable(),
		maxCapacity: percentField,
		minCapacity: percentField,
		oilCooling: z.enum(['none', 'water', 'refrigerant', 'injection', 'unknown']).nullable(),
		economiser: z.boolean().nullable(),
		pumpDownOnStop: z.boolean().nullable(),
		evapFluid: fluidSchema.nullable(),
		/** L/s */
		designEvapFlow: z.number().positive().nullable(),
		designCondFlow: z.number().positive().nullable(),
		/** pressure drop over the shell (kPa) against flow (L/s), from the maker's sheet */
		evapFlowCurve: flowCurveSchema.nullable(),
		condFlowCurve: flowCurveSchema.nullable(),
		/** K */
		designEvapDelta: z.number().positive().nullable(),
		designCondDelta: z.number().positive().nullable(),
		/** kW of cooling */
		designDuty: z.number().positive().nullable()
	})
	.partial();
export type UnitNature = z.infer<typeof natureSchema>;

export const LIMIT_KEYS = [
	'startUpWindow', // s
	'firstStartRest', // s
	'evapSaturationCutout', // °C
	'evapSaturationCutoutDelay', // s
	'startBypass', // s
	'cutoutDegreeSeconds', // K·s
	'suctionPressureCutout', // kPa absolute
	'leavingWaterCutout', // °C
	'freezeLimit', // °C
	'condSaturationCutout', // °C
	'condPressureCutout', // kPa absolute
	'dischargeTempCutout', // °C
	'oilTempCutout', // °C
	'oilNetCutout', // kPa
	'systemDeltaCutout', // kPa
	'marginCutout', // K
	'windingTempCutout', // °C
	'startCapacityUsualLow', // %
	'startCapacityUsualHigh', // %
	'startCapacityOverStaged', // %
	'fullLoading', // %
	'stallBandLow', // %
	'stallBandHigh', // %
	'lineRestrictionMargin', // K, oil minus condensing, negative
	'marginUsualAtStart', // K
	'oilTempUsualHigh', // °C
	'pairedSensorTolerance', // K
	'hardSensorTolerance', // K
	'oilLevelLow', // mm above the separator's base
	'oilLevelHigh', // mm
	'condWaterLeast', // °C
	'evapApproachUsualHigh', // K
	'condApproachUsualHigh', // K
	'superheatUsualLow', // K
	'superheatUsualHigh', // K
	'currentLimit', // % of rated
	'pumpLead' // s
] as const;
export type LimitKey = (typeof LIMIT_KEYS)[number];

/** Where a number comes from: the unit's maker, the trade's common practice, this product's choice, the caller, or learned from the unit's own history. */
export const provenanceSchema = z.enum(['maker', 'practice', 'ours', 'given', 'learned', 'source']);
export type Provenance = z.infer<typeof provenanceSchema>;

/** One value of a limit, in stored units, valid from an instant on (ms UTC; −Infinity = for all time). */
export type LimitValue = { value: number; provenance: Provenance; validFrom: number; note?: string };

/** All values of a unit's limits, each list sorted by `validFrom`. A limit that is not there is not known. */
export type LimitHistory = Partial<Record<LimitKey, readonly LimitValue[]>>;

/** The value of a limit in force at an instant, or null. */
export function limitAt(limits: LimitHistory, key: LimitKey, at: number): LimitValue | null {
	let found: LimitValue | null = null;
	for (const entry of limits[key] ?? []) if (entry.validFrom <= at) found = entry;
	return found;
}

/** Limits every unit has from the beginning: this product's own choices, editable. */
export const DEFAULT_LIMITS: LimitHistory = {
	startUpWindow: [{ value: 1200, provenance: 'ours', validFrom: -Infinity }],
	firstStartRest: [{ value: 21600, provenance: 'ours', validFrom: -Infinity }]
};

const plateText = z.string().trim().max(120);
/** What stands on the unit's plate and in its papers, in the office's words. */
export const namePlateSchema = z
	.object({
		serial: plateText,
		year: z.number('a year, for example 2011').int().min(1900).max(2200).nullable(),
		place: plateText,
		/** kg */
		charge: z.number('a number of kg, for example 212.5').positive().nullable(),
		oilGrade: plateText,
		/** L */
		oilCharge: z.number('a number of L, for example 20').positive().nullable()
	})
	.partial();
export type NamePlate = z.infer<typeof namePlateSchema>;

/** A person at a site who is no member: who to ask for, who gets the report. */
export const contactSchema = z.object({
	name: z.string().trim().min(1).max(120),
	job: z.string().trim().max(120).default(''),
	phone: z.string().trim().max(60).default(''),
	email: z.union([z.email(), z.literal('')]).default(''),
	/** gets the report of a visit */
	report: z.boolean().default(false)
});
export type Contact = z.infer<typeof contactSchema>;
