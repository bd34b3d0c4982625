import type { SignalKey } from './signals';
import type { SuspectKey } from './suspect';

type CheckBase = {
	/** ms UTC */
	at: number;
	/** Read under conditions that were not met (not settled, hard to reach): counts half. */
	indicative: boolean;
	/** Signed by a technician. */
	signed: boolean;
};

/** A field check as the analysis needs it. Stored units. */
export type FieldCheckFact = CheckBase &
	(
		| { kind: 'oil-level'; heightMm: number; lowMm: number | null; highMm: number | null }
		| { kind: 'sensor'; signal: SignalKey; displayed: number; reference: number; toleranceK: number | null }
		| { kind: 'water-flow'; side: 'evaporator' | 'condenser'; flow: number; design: number | null }
		| { kind: 'oil-filter-drop'; drop: number; clean: number | null }
		| { kind: 'valve-travel'; commanded: number; actual: number }
		| { kind: 'solenoid'; which: 'load' | 'unload' | 'liquid-line' | 'other'; works: boolean }
		/** What a person found out about a suspect by any other check. */
		| { kind: 'finding'; suspect: SuspectKey; confirms: boolean; text: string }
		| { kind: 'note'; text: string }
	);

/** Something that was changed on the unit at a time. */
export type ChangeFact = {
	id: string;
	/** ms UTC */
	at: number;
	text: string;
	/** Suspects that the change was meant to remove. */
	aimedAt: readonly SuspectKey[];
	/** The compressor, controller or a sensor was replaced: the history before is another machine's. */
	newHistory: boolean;
};
