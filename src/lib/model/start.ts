import type { Interval } from './series';

export const OUTCOMES = ['tripped', 'held', 'called-off', 'lost', 'unclear'] as const;
export type Outcome = (typeof OUTCOMES)[number];

export const TRIP_KINDS = [
	'low-evaporator-saturation',
	'low-suction-pressure',
	'low-leaving-water',
	'oil-flow',
	'high-oil-temperature',
	'high-condensing',
	'high-discharge-temperature',
	'loss-of-water-flow',
	'low-pressure-difference',
	'motor-temperature',
	'starter-fault',
	'phase-or-supply',
	'sensor-or-communication',
	'external-interlock',
	'refrigerant-detector',
	'emergency-stop',
	'other',
	'unknown'
] as const;
export type TripKind = (typeof TRIP_KINDS)[number];

/** Where a start is known from: a trend log, or without one a person's typing or an alarm list. */
export const START_SOURCES = ['log', 'typed', 'alarm-list'] as const;
export type StartSource = (typeof START_SOURCES)[number];

/** The protections whose headroom is watched. */
export const PROTECTIONS = [
	'evapSaturation',
	'suctionPressure',
	'leavingWater',
	'condSaturation',
	'condPressure',
	'dischargeTemp',
	'oilTemp',
	'oilNet',
	'systemDelta',
	'margin',
	'windingTemp'
] as const;
export type Protection = (typeof PROTECTIONS)[number];

/** Every figure of a start, with the quantity its value has (stored units; see quantities.ts). */
export const FIGURES = {
	startCapacity: 'percent',
	startAmps: 'current',
	peakCapacity: 'percent',
	timeTo50Seconds: 'duration',
	timeTo75Seconds: 'duration',
	timeTo90Seconds: 'duration',
	timeToPeakSeconds: 'duration',
	minEvapSaturation: 'temperature',
	minEvapSaturationAtSeconds: 'duration',
	steepestFall: 'temperatureRate',
	secondsBelowCutout: 'duration',
	degreeSecondsBelowCutout: 'temperatureDifference',
	recoverySeconds: 'duration',
	evapApproach: 'temperatureDifference',
	condApproach: 'temperatureDifference',
	superheat: 'temperatureDifference',
	settledDischargeSuperheat: 'temperatureDifference',
	settledSubcooling: 'temperatureDifference',
	settledMargin: 'temperatureDifference',
	settledCapacity: 'percent',
	settledLift: 'temperatureDifference',
	settledOilTemp: 'temperature',
	settledSeconds: 'duration',
	evapDelta: 'temperatureDifference',
	flow: 'flow',
	duty: 'duty',
	powerPerDuty: 'count',
	minSuperheat: 'temperatureDifference',
	minDischargeSuperheat: 'temperatureDifference',
	minMargin: 'temperatureDifference',
	maxMargin: 'temperatureDifference',
	marginSlope: 'temperatureRate',
	oilTempSlope: 'temperatureRate',
	maxOilTemp: 'temperature',
	maxCondSaturation: 'temperature',
	maxValvePosition: 'percent',
	meanValvePosition: 'percent',
	secondsAtValveLimit: 'duration',
	systemDeltaAt30s: 'pressureDifference',
	systemDeltaAt60s: 'pressureDifference',
	liftAtStart: 'temperatureDifference',
	minOilNet: 'pressureDifference',
	oilTempAtStart: 'temperature',
	waterOutAtStart: 'temperature',
	oilLiftAtStart: 'temperatureDifference',
	condWaterInAtStart: 'temperature',
	outdoorAtStart: 'temperature',
	pullDownRate: 'temperatureRate',
	'headroom.evapSaturation': 'temperatureDifference',
	'headroom.suctionPressure': 'pressureDifference',
	'headroom.leavingWater': 'temperatureDifference',
	'headroom.condSaturation': 'temperatureDifference',
	'headroom.condPressure': 'pressureDifference',
	'headroom.dischargeTemp': 'temperatureDifference',
	'headroom.oilTemp': 'temperatureDifference',
	'headroom.oilNet': 'pressureDifference',
	'headroom.systemDelta': 'pressureDifference',
	'headroom.margin': 'temperatureDifference',
	'headroom.windingTemp': 'temperatureDifference'
} as const;
export type FigureKey = keyof typeof FIGURES;
export const FIGURE_KEYS = Object.keys(FIGURES) as readonly FigureKey[];

/** Why a figure is null. `detail` is a whole sentence for the reader. */
export const ABSENT_REASONS = [
	'signal-missing',
	'gap',
	'run-too-short',
	'too-coarse',
	'does-not-apply',
	'no-settled-stretch',
	'no-limit',
	'no-rest',
	'cannot-tell'
] as const;
export type AbsentReason = (typeof ABSENT_REASONS)[number];

export type Trip = {
	/** ms UTC */
	at: number;
	kind: TripKind;
	basis: 'recorded' | 'inferred';
	/** The log's own words, when recorded. */
	text: string | null;
	/** How sure an inferred trip is, 0…1; 1 for a recorded one. */
	sureness: number;
	/** What the inference rests on, or how the record was matched, as a sentence. */
	reason: string;
};

export type Stall = {
	/** ms UTC */
	from: number;
	to: number;
	levelPct: number;
	demandPct: number | null;
	verdict: 'stall' | 'limited' | 'cannot-tell';
	limiting: string | null;
};

/** One start as the analysis knows it. Times are ms UTC, quantities in stored units. */
export type StartRecord = {
	circuit: string;
	/** `log` when absent. Of an alarm list without a start line this is the instant of the trip. */
	source?: StartSource;
	startedAt: number;
	/** null while it still runs at the log's end */
	endedAt: number | null;
	/** The true instant lies within this many seconds before `startedAt`. */
	uncertaintySeconds: number;
	endUncertaintySeconds: number;
	/** Typical spacing of the telling signals in the first minutes, seconds. */
	spacingSeconds: number;
	outcome: Outcome;
	/** Why the outcome is what it is, as a sentence. */
	outcomeReason: string;
	startupTrip: boolean;
	firstStart: boolean;
	circuitFirst: boolean;
	unitFirst: boolean;
	othersRunning: number;
	/** Off time before; null when nothing is known of it. */
	restSeconds: number | null;
	/** The rest touches a gap or the log's beginning: "at least". */
	restAtLeast: boolean;
	/** Rest over 7 days. */
	layUp: boolean;
	/** The episode is named by its first try's start time; null only while unknown. */
	episode: number | null;
	tryNumber: number;
	attended: boolean;
	/** Time holes inside the run. */
	holes: readonly Interval[];
	trip: Trip | null;
	stall: Stall | null;
	settled: Interval | null;
	/** Where `running` came from; `record` for a start without a trend log. */
	runningFrom: 'record' | 'running' | 'motorCurrent' | 'power' | 'speed' | 'capacity' | 'startCommand';
	notes: readonly string[];
	figures: Record<FigureKey, number | null>;
	absent: Partial<Record<FigureKey, { reason: AbsentReason; detail: string }>>;
	/** Marks on figures that were read outside their usual window: `early`, `coarse`. */
	marks: Partial<Record<FigureKey, 'early' | 'coarse'>>;
	methodVersion: string;
};

/** A person's correction of a start; survives recomputation (matched by circuit and nearest start within 2 min). */
export type StartCorrection = {
	circuit: string;
	startedAt: number;
	outcome?: Outcome;
	tripKind?: TripKind;
	attended?: boolean;
	newStartedAt?: number;
	reason: string;
};
