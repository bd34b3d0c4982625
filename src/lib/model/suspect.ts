export const SUSPECT_KEYS = [
	'low-oil',
	'oil-restriction',
	'slide-not-unloading',
	'slide-not-loading',
	'valve-underfeeding',
	'valve-overfeeding',
	'evap-saturation-sensor',
	'suction-temperature-sensor',
	'low-water-flow',
	'flow-proving',
	'water-short-circuit',
	'low-refrigerant-charge',
	'liquid-line-restriction',
	'suction-restriction',
	'cold-condenser-water',
	'low-pressure-difference',
	'fouled-condenser',
	'non-condensables',
	'fouled-evaporator',
	'oil-in-evaporator',
	'refrigerant-migration',
	'oil-heater',
	'valve-leaking-back',
	'economiser-or-injection',
	'starter-or-supply',
	'limits-or-setup',
	'plant-staging'
] as const;
export type SuspectKey = (typeof SUSPECT_KEYS)[number];

export type Standing = 'points-to' | 'fits' | 'speaks-against' | 'cannot-tell';
export type Verdict = 'fault-pattern' | 'no-fault-pattern' | 'cannot-tell';

export type Clue = {
	key: string;
	direction: 'for' | 'against' | 'missing';
	/** 0…1, this product's own until checked on repaired cases. */
	weight: number;
	sentence: string;
	figures: Record<string, number>;
	/** Starts this clue is read from, as ms UTC of their start (the service turns them into ids). */
	starts: number[];
	/** What to show when the clue is opened: signals and seconds from the start. */
	show?: { signals: string[]; from: number; to: number };
};

export type DecisiveCheck = { key: string; title: string; tools: string[]; cautions: string[]; unitOff: boolean };

export type SuspectResult = {
	key: SuspectKey;
	rank: number;
	standing: Standing;
	clues: Clue[];
	decisiveCheck: DecisiveCheck;
};

export type SuspectsResult = { verdict: Verdict; suspects: SuspectResult[]; missingSignals: string[] };
