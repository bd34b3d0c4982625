import type { Quantity } from '$lib/model/quantities';
import type { Interval } from '$lib/model/series';

export const REST_TESTS = {
	'oil-heater': 'oil at rest',
	equalising: 'pressures equalising',
	'entering-leaving-offset': 'entering against leaving water',
	'saturation-leaving-offset': 'evaporator saturation against leaving water',
	'suction-saturation-offset': 'suction against evaporator saturation',
	'non-condensables': 'condensing saturation against condenser water',
	'oil-lift': 'oil above saturation at the restart'
} as const;
export type RestTestKey = keyof typeof REST_TESTS;

/** `shown`: a figure without a verdict. */
export type RestOutcome = 'passed' | 'failed' | 'not-testable' | 'shown';

/** What one rest says to one test. `value` in stored units of `quantity`. */
export type RestReading = {
	key: RestTestKey;
	result: RestOutcome;
	value: number | null;
	quantity: Quantity;
	why: string;
};

/** One rest between a stop and the next start (or the log's end). */
export type NightRest = Interval & {
	/** The start that ended the rest, ms; null when the log ends first. */
	startAt: number | null;
	results: RestReading[];
};

/** What all rests together say to one test. */
export type NightTest = {
	key: RestTestKey;
	label: string;
	result: RestOutcome;
	sentence: string;
	value: number | null;
	quantity: Quantity;
	/** How many rests could be tested. */
	rests: number;
};

export type NightsResult = { rests: NightRest[]; tests: NightTest[] };
