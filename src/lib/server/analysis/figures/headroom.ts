import type { FigureKey, StartRecord, Protection } from '$lib/model/start';
import type { LearnedBracket } from '$lib/model/circuit-input';
import { spacingWithin } from '../series/spacing';
import { absence, during, missing, put, type Absence, type FigureContext, type Figures } from './sheet';
import { WATCHES, type Watch } from './protections';

/** Headroom is read over the first ten minutes, s. */
const HEADROOM_TO = 600;

type Lowest = { distanceTo: (limit: number) => number; extreme: number };

/** The reading nearest the protection in the first 10 min after the bypass, with its slope toward it × spacing. */
function closest(context: FigureContext, watch: Watch): Lowest | Absence {
	const bypass = context.circuit.limit('startBypass', context.startedAt) ?? 0;
	const found = during(context, watch.trace, Math.max(bypass, watch.from), HEADROOM_TO);
	if (!('v' in found)) return found;
	let best = 0;
	for (let i = 1; i < found.v.length; i++) {
		if (watch.side * (found.v[i] ?? NaN) < watch.side * (found.v[best] ?? NaN)) best = i;
	}
	const value = found.v[best] ?? NaN;
	const before = found.v[best - 1];
	const spacing =
		(spacingWithin(
			found.series,
			context.startedAt,
			Math.min(context.run.lastOn, context.startedAt + HEADROOM_TO * 1000)
		) ?? context.spacing) * 1000;
	const apart = (found.t[best] ?? NaN) - (found.t[best - 1] ?? NaN);
	const closing = before === undefined ? 0 : (Math.max(0, watch.side * (before - value)) / apart) * spacing;
	return { extreme: value, distanceTo: (limit) => watch.side * (value - limit) - closing };
}

/**
 * headroom.{protection}: the least distance to its limit in the first 10 min after the start-up bypass, made smaller by
 * slope × spacing (the slope between the nearest reading and the one before it). The limit is the configured one, else
 * the middle of the learned bracket. Units of the quantity; negative = past it.
 */
export function readHeadroom(context: FigureContext, sheet: Figures, learned: readonly LearnedBracket[]): void {
	for (const watch of WATCHES) {
		const key: FigureKey = `headroom.${watch.protection}`;
		if (context.circuit.trace(watch.trace) === undefined) {
			put(sheet, key, missing(context, watch.trace));
			continue;
		}
		const limit = limitOf(context, watch, learned);
		if (typeof limit !== 'number') {
			put(sheet, key, limit);
			continue;
		}
		const near = closest(context, watch);
		put(sheet, key, 'distanceTo' in near ? near.distanceTo(limit) : near);
	}
}

function limitOf(context: FigureContext, watch: Watch, learned: readonly LearnedBracket[]): number | Absence {
	for (const key of watch.limits) {
		const value = context.circuit.limit(key, context.startedAt);
		if (value !== null) return value;
	}
	const bracket = learned.find((each) => each.protection === watch.protection);
	if (bracket === undefined)
		return absence('no-limit', `No limit is set for ${watch.words}, and no trip has shown it.`);
	if (bracket.inverted) {
		return absence('cannot-tell', `Held starts went further than tripped ones: ${watch.words} is not what trips it.`);
	}
	return bracket.limit;
}

/**
 * Brackets learned from the unit's own starts: for each protection with a recorded trip of its kind, between the value
 * at which it tripped (the one farthest from the limit side) and the nearest that was survived. Inverted when a held
 * start went past a tripping value: this quantity is not what trips it, or a sensor, delay or setting is in play.
 * `contexts` and `starts` run in step.
 */
export function learnBrackets(
	contexts: readonly FigureContext[],
	starts: readonly Pick<StartRecord, 'outcome' | 'trip'>[]
): LearnedBracket[] {
	const brackets: LearnedBracket[] = [];
	for (const watch of WATCHES) {
		if (watch.kind === 'oil-flow' && watch.protection === 'margin') continue;
		const tripped: number[] = [];
		const survived: number[] = [];
		starts.forEach((start, i) => {
			const context = contexts[i];
			const trips = start.outcome === 'tripped' && start.trip?.kind === watch.kind && start.trip.basis === 'recorded';
			if (context === undefined || !(trips || start.outcome === 'held')) return;
			const near = closest(context, watch);
			if ('extreme' in near) (trips ? tripped : survived).push(watch.side * near.extreme);
		});
		if (tripped.length === 0) continue;
		brackets.push(bracketOf(watch, tripped, survived));
	}
	return brackets;
}

/** In the sense of `side`: low limits as they are, high ones mirrored. */
function bracketOf(watch: Watch, tripped: readonly number[], survived: readonly number[]): LearnedBracket {
	const trippedAt = Math.max(...tripped);
	const survivedAt = survived.length > 0 ? Math.min(...survived) : null;
	const inverted = survivedAt !== null && survivedAt < trippedAt;
	const limit = survivedAt === null || inverted ? trippedAt : (trippedAt + survivedAt) / 2;
	return {
		protection: watch.protection satisfies Protection,
		trippedAt: watch.side * trippedAt,
		survivedAt: survivedAt === null ? null : watch.side * survivedAt,
		limit: watch.side * limit,
		inverted,
		trips: tripped.length,
		survivals: survived.length
	};
}
