import { z } from 'zod';
import { SIGNAL_KEYS } from '../signals';
import { SUSPECT_KEYS } from '../suspect';
import { LIMIT_KEYS } from '../unit';
import { idSchema, instantSchema } from './common';

/** Field checks and changes as they are recorded and answered. One schema for page and API. */

const text = (most: number) => z.string().trim().max(most);
const maybe = (schema: z.ZodType<number>) => schema.nullable().default(null);
const millimetres = z.number().min(-2000).max(5000);
const minutes = z.number().min(0).max(100_000);
const positive = z.number().positive();
const yesNo = z.boolean().nullable().default(null);

const oilLevel = z.object({
	heightMm: millimetres.meta({ description: 'mm above the separator’s base' }),
	lowMm: maybe(millimetres).meta({ description: 'of the unit’s own band; its limits when left out' }),
	highMm: maybe(millimetres),
	minutesRun: maybe(minutes).meta({ description: 'min of running before it stopped' }),
	minutesOff: maybe(minutes).meta({ description: 'min off before the reading' }),
	equalised: yesNo.meta({ description: 'were the pressures equalised?' })
});
const sensor = z.object({
	signal: z.enum(SIGNAL_KEYS),
	displayed: z.number().meta({ description: 'stored unit of the signal: °C, kPa absolute, kPa, L/s, %, A' }),
	reference: z.number(),
	toleranceK: maybe(positive).meta({ description: 'K; 2 °F, or 3 °F where it is hard to reach, when left out' }),
	instrument: text(120).default(''),
	accuracyK: maybe(z.number().min(0)).meta({ description: 'K, of the instrument' }),
	hardToReach: z.boolean().default(false),
	sameSecond: yesNo.meta({ description: 'both read at the same second?' }),
	flowProved: yesNo.meta({ description: 'was water flow proved? water sensors only' })
});
const waterFlow = z.object({
	side: z.enum(['evaporator', 'condenser']),
	drop: maybe(positive).meta({ description: 'kPa over the shell; the flow follows from the unit’s curve' }),
	flow: maybe(positive).meta({ description: 'L/s, when it was measured itself' }),
	design: maybe(positive).meta({ description: 'L/s; the unit’s own when left out' })
});
const oilFilterDrop = z.object({
	drop: z.number().min(0).max(5000).meta({ description: 'kPa' }),
	clean: maybe(z.number().min(0).max(5000)).meta({ description: 'kPa with a clean filter, from the maker' })
});
const valveTravel = z.object({
	commanded: z.number().min(0).max(100),
	actual: z.number().min(0).max(100)
});
const solenoid = z.object({
	which: z.enum(['load', 'unload', 'liquid-line', 'other']),
	works: z.boolean().meta({ description: 'did what it commands move?' }),
	ohms: maybe(z.number().min(0)),
	ratedOhms: maybe(positive),
	volts: maybe(z.number().min(0)).meta({ description: 'V under command, read by a qualified person' }),
	ratedVolts: maybe(positive)
});
const finding = z.object({
	suspect: z.enum(SUSPECT_KEYS),
	confirms: z.boolean(),
	text: text(1000).min(1)
});
const note = z.object({ text: text(4000).min(1) });

/** The readings of each kind of check. */
export const READING_SCHEMAS = {
	'oil-level': oilLevel,
	sensor,
	'water-flow': waterFlow,
	'oil-filter-drop': oilFilterDrop,
	'valve-travel': valveTravel,
	solenoid,
	finding,
	note
} as const;
export type CheckKind = keyof typeof READING_SCHEMAS;
export const CHECK_KINDS = Object.keys(READING_SCHEMAS) as readonly CheckKind[];
export type Readings<K extends CheckKind = CheckKind> = z.output<(typeof READING_SCHEMAS)[K]>;

const common = {
	clientKey: text(80).min(8).optional().meta({ description: 'your own key: a check sent twice is kept once' }),
	circuit: z.string().max(4).nullable().default(null),
	at: instantSchema.optional().meta({ description: 'when it was read; now when left out' }),
	caseId: idSchema.nullable().default(null),
	visitId: idSchema.nullable().default(null)
};
const checkCommon = {
	...common,
	note: text(4000).default(''),
	indicativeReason: text(300)
		.default('')
		.meta({ description: 'a person’s own reason why it is indicative only; conditions of the form add theirs' }),
	suspect: z.enum(SUSPECT_KEYS).nullable().default(null).meta({ description: 'the suspect this check settles' })
};
const of = <K extends CheckKind>(kind: K) =>
	z.object({ ...checkCommon, kind: z.literal(kind), readings: READING_SCHEMAS[kind] });

export const checkInputSchema = z
	.discriminatedUnion('kind', [
		of('oil-level'),
		of('sensor'),
		of('water-flow').refine(({ readings }) => readings.drop !== null || readings.flow !== null, {
			message: 'give the pressure drop, or the flow itself',
			path: ['readings', 'drop']
		}),
		of('oil-filter-drop'),
		of('valve-travel'),
		of('solenoid'),
		of('finding'),
		of('note')
	])
	.meta({ id: 'CheckInput' });
export type CheckInput = z.output<typeof checkInputSchema>;
export type CheckInputSent = z.input<typeof checkInputSchema>;

export const photoSchema = z
	.object({
		id: idSchema,
		checkId: idSchema.nullable(),
		caption: z.string(),
		kind: z.enum(['camera', 'thermal', 'sight-glass']),
		width: z.number(),
		height: z.number(),
		bytes: z.number(),
		view: z.string().meta({ description: 'address of the resized picture' }),
		original: z.string(),
		createdAt: instantSchema
	})
	.meta({ id: 'Photo' });
export type Photo = z.infer<typeof photoSchema>;

export const checkSchema = z
	.object({
		id: idSchema,
		unitId: idSchema,
		clientKey: z.string().nullable(),
		circuit: z.string().nullable(),
		caseId: idSchema.nullable(),
		visitId: idSchema.nullable(),
		kind: z.string(),
		readings: z.record(z.string(), z.unknown()),
		result: z.enum(['within', 'outside', 'cannot-tell', 'told']),
		verdict: z.string().meta({ description: 'one sentence, in the units of the answer' }),
		indicative: z.boolean(),
		indicativeReason: z.string().nullable(),
		note: z.string(),
		at: instantSchema,
		by: z.string(),
		signedAt: instantSchema.nullable(),
		signedBy: z.string().nullable(),
		suspect: z.enum(SUSPECT_KEYS).nullable(),
		photos: z.array(photoSchema)
	})
	.meta({ id: 'Check', description: 'readings are in stored units: mm, °C, K, kPa absolute, L/s, %, Ω, V' });
export type Check = z.infer<typeof checkSchema>;

export const CHANGE_KINDS = [
	'oil',
	'refrigerant',
	'sensor',
	'solenoid',
	'valve',
	'setting',
	'cleaning',
	'water-side',
	'electrical',
	'compressor',
	'controller',
	'other'
] as const;
export type ChangeKind = (typeof CHANGE_KINDS)[number];

export const changeInputSchema = z
	.object({
		...common,
		kind: z.enum(CHANGE_KINDS),
		text: text(1000).min(1, 'say what was changed'),
		limit: z.enum(LIMIT_KEYS).nullable().default(null).meta({ description: 'the limit that a setting changed' }),
		amount: maybe(z.number()).meta({ description: 'added (+) or taken out (−): oil in L, refrigerant in kg' }),
		certifiedPerson: text(160)
			.nullable()
			.default(null)
			.meta({ description: 'name and certificate of who handled the refrigerant' }),
		aimedAt: z.array(z.enum(SUSPECT_KEYS)).max(6).default([]),
		splits: z.boolean().default(false).meta({ description: 'figures before it are no baseline after it' })
	})
	.refine((change) => change.kind !== 'refrigerant' || (change.certifiedPerson ?? '') !== '', {
		message: 'give the name and certificate of who handled the refrigerant',
		path: ['certifiedPerson']
	})
	.refine((change) => !['oil', 'refrigerant'].includes(change.kind) || change.amount !== null, {
		message: 'say how much was added (+) or taken out (−)',
		path: ['amount']
	})
	.meta({ id: 'ChangeInput' });
export type ChangeInput = z.output<typeof changeInputSchema>;
export type ChangeInputSent = z.input<typeof changeInputSchema>;

export const changeSchema = z
	.object({
		id: idSchema,
		unitId: idSchema,
		clientKey: z.string().nullable(),
		circuit: z.string().nullable(),
		caseId: idSchema.nullable(),
		kind: z.string(),
		text: z.string(),
		limit: z.string().nullable(),
		amount: z.number().nullable(),
		amountUnit: z.string().nullable(),
		certifiedPerson: z.string().nullable(),
		aimedAt: z.array(z.enum(SUSPECT_KEYS)),
		splits: z.boolean(),
		at: instantSchema,
		by: z.string()
	})
	.meta({ id: 'Change' });
export type Change = z.infer<typeof changeSchema>;

/** What was put in and taken out over the unit's recorded life. */
export const balanceSchema = z
	.object({ unit: z.string(), added: z.number(), removed: z.number(), net: z.number(), times: z.number().int() })
	.meta({ id: 'Balance' });
export type Balance = z.infer<typeof balanceSchema>;
