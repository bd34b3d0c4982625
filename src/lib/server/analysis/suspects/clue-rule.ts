import type { Clue, DecisiveCheck, SuspectKey } from '$lib/model/suspect';
import type { StartRecord } from '$lib/model/start';
import type { UnitNature } from '$lib/model/unit';
import type { Context } from './context';
import type { Readable } from './trace-reader';

/** What a clue's function found: nothing to say (strength 0), or something with its numbers. */
export type ClueReading = {
	/** 0…1: how strongly the reading speaks. */
	strength: number;
	sentence: string;
	figures: Record<string, number>;
	starts: readonly StartRecord[];
	show?: Clue['show'];
};

/** A trace, or several of which any one will do, the best first. */
export type Need = Readable | readonly Readable[];

/** One clue of the declared table. */
export type ClueRule = {
	key: string;
	direction: 'for' | 'against';
	/** Weight at full strength, 0…1: ours until checked on repaired cases. */
	weight: number;
	/** A positive discriminator: at least one of these must speak before a suspect can stand first. */
	discriminates?: boolean;
	/** Found by people under the right conditions: against a suspect it takes its standing, whatever the log says. */
	overrules?: boolean;
	/** When the reading is taken: decides how finely and how long it must be logged. Default: around the start. */
	readAt?: 'start' | 'run' | 'rest';
	/** Every one of these is needed (of a list: any one); what the log lacks is named. */
	needs: readonly Need[];
	/** 1 applies, 0.5 nature unknown, 0 does not apply. */
	applies?: (nature: UnitNature) => 0 | 0.5 | 1;
	/** Null: the signals are there but cannot be read here (spacing, no such start). */
	read: (context: Context) => ClueReading | null;
};

/** One row of the suspects table. */
export type SuspectRow = {
	key: SuspectKey;
	/** Order of thought on the page. */
	family: 'real' | 'water' | 'oil' | 'load' | 'feed' | 'high-side' | 'electrical' | 'plant';
	applies: (nature: UnitNature) => 0 | 0.5 | 1;
	clues: readonly ClueRule[];
	/** Suspects that bring this one's signature with them: when one of them stands, this share of its score weighs against. */
	explainedBy?: readonly { key: SuspectKey; share: number }[];
	/** Which trips its clues are read from: `low-side` leaves out flow, electrical, oil and high-side trips; `head` takes oil and difference trips too. */
	trips?: 'low-side' | 'head';
	/** May be named on a unit without a trip or a stall (a slow fault that shows in settled runs). */
	showsWithoutSymptom?: boolean;
	check: DecisiveCheck;
};

/** Does one of the values fit? Unknown counts half. */
export function natureIs<K extends keyof UnitNature>(key: K, ...fits: readonly UnitNature[K][]) {
	return (nature: UnitNature): 0 | 0.5 | 1 => {
		const value = nature[key];
		if (value === null || value === undefined || value === 'unknown') return 0.5;
		return fits.includes(value) ? 1 : 0;
	};
}

export const always = (): 1 => 1;

/** A reading that says nothing. */
export const SILENT: ClueReading = { strength: 0, sentence: '', figures: {}, starts: [] };
