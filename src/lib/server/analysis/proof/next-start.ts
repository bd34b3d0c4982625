import type { TripKind } from '$lib/model/start';
import { betaQuantile } from '../statistics/beta-quantile';
import { logBeta } from '../statistics/log-beta';

const DAY = 86_400_000;
/** Weight of a first try halves every fortnight. */
const HALF_LIFE_DAYS = 14;
/** Fewer units than this say nothing about each other: Jeffreys' prior. */
const UNITS_FOR_PRIOR = 5;

/** Counted first tries of one unit since its last change. */
export type UnitTries = { unit: string; tries: readonly { at: number; tripped: boolean; kind: TripKind | null }[] };

export type BetaShape = { a: number; b: number };

/** The kind most of the unit's start-up trips were of, latest first among equals; null without a trip. */
export function failingKind(tries: UnitTries['tries']): TripKind | null {
	const counts = new Map<TripKind, number>();
	let best: TripKind | null = null;
	for (const { tripped, kind } of [...tries].reverse()) {
		if (!tripped || kind === null) continue;
		counts.set(kind, (counts.get(kind) ?? 0) + 1);
		if (best === null || (counts.get(kind) ?? 0) > (counts.get(best) ?? 0)) best = kind;
	}
	return best;
}

/** Weighted trips of the failing kind and weighted first tries: weights 2^(−age/14 d). */
export function weightedTries(tries: UnitTries['tries'], now: number): { k: number; m: number } {
	const kind = failingKind(tries);
	let [k, m] = [0, 0];
	for (const one of tries) {
		const weight = 2 ** (-Math.max(0, now - one.at) / (HALF_LIFE_DAYS * DAY));
		m += weight;
		if (one.tripped && one.kind === kind) k += weight;
	}
	return { k, m };
}

/**
 * The organisation's prior Beta(s·π, s(1−π)): π the pooled weighted rate, s the value of 2, 3 … 20 with the greatest
 * marginal likelihood over its units (beta-binomial). Fewer than five units: Jeffreys' Beta(½, ½).
 * Source: empirical Bayes, Casella, The American Statistician 39 (1985) 83.
 */
export function organisationPrior(units: readonly { k: number; m: number }[]): BetaShape {
	const known = units.filter((unit) => unit.m > 0);
	if (known.length < UNITS_FOR_PRIOR) return { a: 0.5, b: 0.5 };
	const k = known.reduce((sum, unit) => sum + unit.k, 0);
	const m = known.reduce((sum, unit) => sum + unit.m, 0);
	const rate = (k + 0.5) / (m + 1);
	let best = { s: 2, likelihood: -Infinity };
	for (let s = 2; s <= 20; s++) {
		const [a, b] = [s * rate, s * (1 - rate)];
		const likelihood = known.reduce((sum, unit) => sum + logBeta(a + unit.k, b + unit.m - unit.k) - logBeta(a, b), 0);
		if (likelihood > best.likelihood) best = { s, likelihood };
	}
	return { a: best.s * rate, b: best.s * (1 - rate) };
}

export type NextStartChance = {
	kind: TripKind | null;
	/** Mean of the rate. */
	chance: number;
	/** 10th percentile, and the 95 % interval of the rate. */
	tenth: number;
	low: number;
	high: number;
	/** Plain counts behind it. */
	trips: number;
	tries: number;
};

/** Chance that the next first try trips, for every unit that has a counted one. Method: method.md, "Next start and repeaters". */
export function nextStartChances(units: readonly UnitTries[], now: number): Map<string, NextStartChance> {
	const counts = units.map((unit) => weightedTries(unit.tries, now));
	const prior = organisationPrior(counts);
	const chances = new Map<string, NextStartChance>();
	units.forEach((unit, i) => {
		const { k, m } = counts[i] ?? { k: 0, m: 0 };
		if (unit.tries.length === 0) return;
		const [a, b] = [prior.a + k, prior.b + m - k];
		const kind = failingKind(unit.tries);
		chances.set(unit.unit, {
			kind,
			chance: a / (a + b),
			tenth: betaQuantile(0.1, a, b),
			low: betaQuantile(0.025, a, b),
			high: betaQuantile(0.975, a, b),
			trips: unit.tries.filter((one) => one.tripped && one.kind === kind).length,
			tries: unit.tries.length
		});
	});
	return chances;
}
