import type { Quantity } from '$lib/model/quantities';
import type { FigureKey, StartRecord } from '$lib/model/start';
import type { UnitNature } from '$lib/model/unit';
import { median } from '../statistics/median';
import { theilSen } from '../statistics/theil-sen';
import { countWords } from '../wording/quantity-words';
import { type ClueReading, type ClueRule, type Need, SILENT } from './clue-rule';
import type { Beside, Context, Reading } from './context';
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

/** The later half of the starts (of those that have a figure; four at least): a fault that grows is judged as it is now. */
export function recent(context: Context, having?: FigureKey): readonly StartRecord[] {
	const starts = having ? context.starts.filter((start) => start.figures[having] !== null) : context.starts;
	return starts.slice(-Math.max(4, Math.ceil(starts.length / 2)));
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
		needs: readonly Need[];
		/** Which starts; left out: the later half of those that have the figure. */
		of?: (context: Context) => readonly StartRecord[];
		/** Read at full load: the figure over the settled share of capacity, where that is known. */
		atFullLoad?: boolean;
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
			const read = spec.atFullLoad ? context.atFullLoad : context.figure;
			const reading = read(spec.figure, spec.of?.(context) ?? recent(context, spec.figure));
			if (!reading) return null;
			return {
				strength: spec.strength(reading.value, context),
				sentence: `${spec.what} ${context.words.of(reading.value, spec.quantity)}${spec.atFullLoad ? ' at full load' : ''}, median of ${countWords(reading.starts.length, 'start')}.`,
				figures: { value: reading.value },
				starts: reading.starts,
				...(spec.show ? { show: spec.show } : {})
			};
		}
	};
}

/** Starts near the median lift (3 K) and settled capacity (10 points): like conditions (method.md, oil limits). */
function likeConditions(starts: readonly StartRecord[]): StartRecord[] {
	const lift = median(starts.map((start) => start.figures.settledLift ?? NaN));
	const load = median(starts.map((start) => start.figures.settledCapacity ?? NaN));
	const near = (value: number | null, middle: number | null, reach: number) =>
		middle === null || value === null || Math.abs(value - middle) <= reach;
	return starts.filter(
		(start) => near(start.figures.settledLift, lift, 3) && near(start.figures.settledCapacity, load, 10)
	);
}

/**
 * A clue from the drift of a settled figure over the period: Theil–Sen over days, of eight starts or more over five
 * days or more, counted only when the slope's interval leaves zero out.
 */
export function driftClue(
	spec: Common & { figure: FigureKey; needs: readonly Need[]; total: Ends; matched?: boolean }
): ClueRule {
	return {
		key: spec.key,
		direction: spec.direction ?? 'for',
		weight: spec.weight,
		discriminates: spec.discriminates ?? false,
		needs: spec.needs,
		readAt: 'run',
		read: (context) => {
			const having = context.starts.filter((start) => start.figures[spec.figure] !== null);
			const starts = spec.matched ? likeConditions(having) : having;
			const days = starts.map((start) => start.startedAt / DAY);
			const span = (days.at(-1) ?? 0) - (days[0] ?? 0);
			if (starts.length < 8 || span < 5) return SILENT;
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

/** A settled figure in the first and in the last third of the runs at like load and lift; null under six such runs. */
export function growthOf(context: Context, figure: FigureKey): { before: Reading; now: Reading } | null {
	const starts = likeConditions(context.starts.filter((start) => start.figures[figure] !== null));
	const third = Math.floor(starts.length / 3);
	if (third < 2) return null;
	const before = context.figure(figure, starts.slice(0, third));
	const now = context.figure(figure, starts.slice(-third));
	return before && now && before.value > 0 ? { before, now } : null;
}

/** A figure that grew by a third or more is not called ordinary. */
export function grew(context: Context, figure: FigureKey): boolean {
	const growth = growthOf(context, figure);
	return (
		growth !== null && growth.now.value > 1.35 * growth.before.value && growth.now.value - growth.before.value > 0.4
	);
}

/**
 * A clue from the growth of a settled figure at like load and lift: the last third of the runs beside the first. A fault
 * that grows inside the log is small in its median.
 */
export function growthClue(
	spec: Common & { figure: FigureKey; needs: readonly Need[]; factor: Ends; by: Ends }
): ClueRule {
	return {
		key: spec.key,
		direction: spec.direction ?? 'for',
		weight: spec.weight,
		discriminates: spec.discriminates ?? false,
		needs: spec.needs,
		readAt: 'run',
		read: (context) => {
			const growth = growthOf(context, spec.figure);
			if (!growth) return SILENT;
			const { before, now } = growth;
			const say = (value: number) => context.words.of(value, spec.quantity);
			return {
				strength: Math.min(ramp(now.value / before.value, ...spec.factor), ramp(now.value - before.value, ...spec.by)),
				sentence: `${spec.what} grew from ${say(before.value)} to ${say(now.value)} at like load.`,
				figures: { before: before.value, now: now.value },
				starts: [...before.starts.slice(0, 2), ...now.starts.slice(-2)]
			};
		}
	};
}

/** A fouled surface grows dirty slowly: an approach that jumps between two runs is another thing, often a sensor. */
export function jumpClue(spec: Common & { figure: FigureKey; needs: readonly Need[] }): ClueRule {
	return {
		key: spec.key,
		direction: 'against',
		weight: spec.weight,
		needs: spec.needs,
		readAt: 'run',
		read: (context) => {
			const runs = likeConditions(context.starts.filter((start) => start.figures[spec.figure] !== null));
			const values = runs.map((start) => start.figures[spec.figure] ?? 0);
			let step = 0;
			let at = 0;
			// Two runs on either side, so that one odd run is no jump.
			for (let i = 2; i + 1 < values.length; i++) {
				const before = Math.max(values[i - 2] ?? 0, values[i - 1] ?? 0);
				const after = Math.min(values[i] ?? 0, values[i + 1] ?? 0);
				if (after - before > step) [step, at] = [after - before, i];
			}
			const whole = Math.max(...values) - Math.min(...values);
			if (values.length < 4 || whole <= 0) return SILENT;
			return {
				strength: ramp(step, 1.5, 3) * ramp(step / whole, 0.4, 0.65),
				sentence: `${spec.what} jumped by ${context.words.of(step, spec.quantity)} from one run to the next.`,
				figures: { step },
				starts: runs.slice(at - 1, at + 1)
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
		overrules: true,
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
