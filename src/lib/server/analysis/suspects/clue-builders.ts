import type { Quantity } from '$lib/model/quantities';
import type { FigureKey, StartRecord } from '$lib/model/start';
import type { UnitNature } from '$lib/model/unit';
import { theilSen } from '../statistics/theil-sen';
import { countWords } from '../wording/quantity-words';
import { type ClueReading, type ClueRule, SILENT } from './clue-rule';
import type { Beside, Context } from './context';
import { ramp } from './strength';
import type { Readable } from './trace-reader';

type Ends = readonly [none: number, full: number];
type Common = {
	key: string;
	direction?: 'for' | 'against';
	weight: number;
	discriminates?: boolean;
	applies?: (nature: UnitNature) => 0 | 0.5 | 1;
	readAt?: ClueRule['readAt'];
	/** What is read, as the sentence calls it: "superheat". */
	what: string;
	quantity: Quantity;
};

const DAY = 86_400_000;

/** Starts whose state is asked: the tripped ones, else all of the period (a stall needs no trip). */
export function telling(context: Context): readonly StartRecord[] {
	return context.bad.length > 0 ? context.bad : context.starts;
}

/**
 * Strength of a reading that may be judged by its own size and by its distance from the held starts. The unit's own
 * history beats a default: with a band the size alone counts 0.6 (held starts may carry the fault too), without 0.75.
 */
export function besideStrength(reading: Beside, size: Ends | null, shift: Ends): number {
	const alone = size ? ramp(reading.value, ...size) : 0;
	if (reading.shift === null || reading.heldCount < 2) return 0.75 * alone;
	const sense = Math.sign(shift[1] - shift[0]);
	const beyond = ramp(reading.shift, shift[0], sense * Math.max(Math.abs(shift[1]), reading.spread));
	return Math.max(beyond, 0.6 * alone);
}

/**
 * A clue from one trace at the tripped starts beside the held ones: in the trip minute, or over a fixed window.
 * @param size none and full of the value itself (null: only beside held starts), `shift` none and full of the distance
 */
export function besideClue(
	spec: Common & {
		trace: Readable;
		window: 'trip minute' | readonly [from: number, to: number];
		earliest?: number;
		size: ((context: Context) => Ends | null) | Ends | null;
		shift: Ends;
	}
): ClueRule {
	return {
		key: spec.key,
		direction: spec.direction ?? 'for',
		weight: spec.weight,
		discriminates: spec.discriminates ?? false,
		needs: [spec.trace],
		...(spec.applies ? { applies: spec.applies } : {}),
		read: (context) => {
			const { window } = spec;
			const reading =
				window === 'trip minute'
					? context.tripMinute(spec.trace, spec.earliest)
					: context.beside(spec.trace, window[0], window[1]);
			if (!reading) return null;
			const size = typeof spec.size === 'function' ? spec.size(context) : spec.size;
			const say = (value: number) => context.words.of(value, spec.quantity);
			const when = window === 'trip minute' ? 'in the trip minute' : `${window[0]} to ${window[1]} s after the start`;
			const beside =
				reading.held === null
					? ''
					: `; ${countWords(reading.heldCount, 'held start')} at the same time: ${say(reading.held)}`;
			return {
				strength: besideStrength(reading, size, spec.shift),
				sentence: `${spec.what} ${say(reading.value)} ${when} (${countWords(reading.starts.length, 'start')})${beside}.`,
				figures: { value: reading.value, ...(reading.held === null ? {} : { held: reading.held }) },
				starts: reading.starts,
				show: { signals: [spec.trace], from: 0, to: window === 'trip minute' ? 300 : window[1] + 60 }
			};
		}
	};
}

/** A clue from a stored figure of the starts that are asked for, judged by its size. */
export function figureClue(
	spec: Common & {
		figure: FigureKey;
		needs: readonly Readable[];
		of: (context: Context) => readonly StartRecord[];
		strength: (value: number, context: Context) => number;
		show?: { signals: string[]; from: number; to: number };
	}
): ClueRule {
	return {
		key: spec.key,
		direction: spec.direction ?? 'for',
		weight: spec.weight,
		discriminates: spec.discriminates ?? false,
		needs: spec.needs,
		...(spec.applies ? { applies: spec.applies } : {}),
		readAt: spec.readAt ?? 'run',
		read: (context) => {
			const reading = context.figure(spec.figure, spec.of(context));
			if (!reading) return null;
			return {
				strength: spec.strength(reading.value, context),
				sentence: `${spec.what} ${context.words.of(reading.value, spec.quantity)}, median of ${countWords(reading.starts.length, 'start')}.`,
				figures: { value: reading.value },
				starts: reading.starts,
				...(spec.show ? { show: spec.show } : {})
			};
		}
	};
}

/**
 * A clue from the drift of a settled figure over the period: Theil–Sen over days, of eight starts or more over a week
 * or more, counted only when the slope's interval leaves zero out.
 */
export function driftClue(spec: Common & { figure: FigureKey; needs: readonly Readable[]; total: Ends }): ClueRule {
	return {
		key: spec.key,
		direction: spec.direction ?? 'for',
		weight: spec.weight,
		discriminates: spec.discriminates ?? false,
		needs: spec.needs,
		readAt: 'run',
		read: (context) => {
			const starts = context.starts.filter((start) => start.figures[spec.figure] !== null);
			const days = starts.map((start) => start.startedAt / DAY);
			const span = (days.at(-1) ?? 0) - (days[0] ?? 0);
			if (starts.length < 8 || span < 7) return SILENT;
			const line = theilSen(
				days,
				starts.map((start) => start.figures[spec.figure] ?? NaN)
			);
			if (!line || line.low * line.high <= 0) return SILENT;
			const total = line.slope * span;
			return {
				strength: ramp(total, ...spec.total),
				sentence: `${spec.what} moved by ${context.words.of(total, spec.quantity)} over ${Math.round(span)} days.`,
				figures: { total, days: span },
				starts: [starts[0], starts.at(-1)].filter((start) => start !== undefined)
			};
		}
	};
}

/** A clue from a field check or a person's finding. */
export function checkClue(
	key: string,
	direction: 'for' | 'against',
	read: (context: Context) => { at: number; half: boolean; sentence: string; strength: number } | null
): ClueRule {
	return {
		key,
		direction,
		weight: 1,
		discriminates: true,
		needs: [],
		read: (context): ClueReading => {
			const found = read(context);
			if (!found) return SILENT;
			return {
				strength: found.strength * (found.half ? 0.5 : 1),
				sentence: `${found.sentence}${found.half ? ' Read under conditions that were not met: counts half.' : ''}`,
				figures: { at: found.at },
				starts: []
			};
		}
	};
}
