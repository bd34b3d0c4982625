import { toStored } from '$lib/model/quantities';
import { SIGNALS, type SignalKey } from '$lib/model/signals';
import type { Problem } from '../types';
import { MANY, SURE, type Guess } from './guess';
import { pairedValues } from './pairs';

function problem(guess: Guess, file: string, kind: string, message: string): Problem {
	return { file, line: null, column: guess.sample.column, kind, message };
}

function sameOwner(a: Guess, b: Guess): boolean {
	if (a.unitId !== b.unitId || !a.signal) return false;
	return SIGNALS[a.signal].scope === 'unit' || a.circuit === b.circuit;
}

/** One column a signal: the surest keeps it, the others are left out with their reason. Two of three files may share one. */
export function settleRivals(guesses: readonly Guess[]): void {
	const order = [...guesses].filter((g) => g.signal !== null).sort((a, b) => b.confidence - a.confidence);
	const kept: Guess[] = [];
	for (const guess of order) {
		const rivals = kept.filter((k) => k.signal === guess.signal && sameOwner(k, guess));
		const otherFile = rivals.every(
			(k) => k.sample.file !== guess.sample.file && k.sample.column === guess.sample.column
		);
		const room = guess.signal && MANY.has(guess.signal) ? rivals.length < 4 : rivals.length === 0 || otherFile;
		if (room) {
			kept.push(guess);
			continue;
		}
		// Two names equally good: neither is sure.
		const winner = rivals[0];
		if (winner && !otherFile && guess.confidence > 0.97 * winner.confidence) {
			winner.confidence *= 0.85;
			winner.reasons.push(`${guess.sample.column} could be it as well`);
		}
		guess.reasons.push(
			`${rivals[0]?.sample.column ?? 'another column'} carries ${SIGNALS[guess.signal ?? 'alarm'].label} more surely`
		);
		guess.signal = null;
		guess.measure = null;
		guess.confidence = 0;
	}
}

/** Columns whose every reading equals another's: the later one adds nothing, and one of the two names is wrong. */
export function findDuplicates(guesses: readonly Guess[], fileOf: (file: number) => string): Problem[] {
	const problems: Problem[] = [];
	for (const [i, a] of guesses.entries()) {
		if (!a.signal || a.sample.shape.distinct < 6) continue;
		for (const b of guesses.slice(i + 1)) {
			if (
				b.sample.t !== a.sample.t ||
				!b.signal ||
				b.signal === a.signal ||
				b.sample.shape.median !== a.sample.shape.median
			)
				continue;
			const pairs = pairedValues(a.sample, b.sample);
			if (pairs.length < 20 || pairs.some(([x, y]) => x !== y)) continue;
			const weaker = b.confidence > a.confidence ? a : b;
			const other = weaker === a ? b : a;
			weaker.confidence = Math.min(weaker.confidence, 0.5);
			weaker.reasons.push(`every reading equals ${other.sample.column}`);
			const message = `"${weaker.sample.column}" repeats every reading of "${other.sample.column}": one of the two is not what its name says.`;
			problems.push(problem(weaker, fileOf(weaker.sample.file), 'duplicate-column', message));
		}
	}
	return problems;
}

/** A working temperature or pressure moves within a day, ms. */
const DEAD_AFTER = 20 * 3_600_000;

function spanOf(t: readonly number[]): number {
	return Math.abs((t.at(-1) ?? NaN) - (t[0] ?? NaN));
}

/** Measured columns that never move although the log goes on. */
export function findDead(guesses: readonly Guess[], fileOf: (file: number) => string): Problem[] {
	const problems: Problem[] = [];
	for (const guess of guesses) {
		if (!guess.signal || SIGNALS[guess.signal].form !== 'analogue' || SIGNALS[guess.signal].quantity === 'percent')
			continue;
		const { shape } = guess.sample;
		if (['waterSetpoint', 'motorCurrent', 'power', 'speed', 'evapFlow', 'condFlow'].includes(guess.signal)) continue;
		if (shape.numbers < 100 || shape.distinct > 1 || spanOf(guess.sample.t) < DEAD_AFTER) continue;
		guess.reasons.push('never moves');
		const message = `"${guess.sample.column}" reads ${shape.least} in every row looked at: a dead sensor or a fixed value.`;
		problems.push(problem(guess, fileOf(guess.sample.file), 'dead-column', message));
	}
	return problems;
}

/** While the compressor runs the first of two is the colder, K of tolerance. Physics of a water chiller: common practice, no source. */
const COLDER: readonly [SignalKey, SignalKey, tolerance: number][] = [
	['evapWaterOut', 'evapWaterIn', 0.3],
	['condWaterIn', 'condWaterOut', 0.3],
	['evapSaturation', 'evapWaterOut', 4],
	['condWaterIn', 'condSaturation', 3],
	['evapSaturation', 'condSaturation', 0],
	['evapWaterOut', 'oilTemp', 2],
	['condSaturation', 'dischargeTemp', 3],
	['evapSaturation', 'suctionTemp', 4]
];

function runs(guesses: readonly Guess[], of: Guess): ((i: number) => boolean) | null {
	const same = (signal: SignalKey) =>
		guesses.find(
			(g) => g.signal === signal && g.unitId === of.unitId && g.sample.t === of.sample.t && g.confidence >= 0.6
		);
	const running = same('running');
	if (running) return (i) => running.sample.v[i] === 1;
	const amps = same('motorCurrent') ?? same('power');
	if (!amps) return null;
	const floor = 0.2 * amps.sample.shape.most;
	return (i) => (amps.sample.v[i] ?? 0) > floor;
}

/** How often, while running, the one is colder than the other; null with fewer than 12 such rows. */
function colderShare(
	a: Guess,
	b: Guess,
	tolerance: number,
	running: (i: number) => boolean
): { yes: number; no: number } | null {
	let [yes, no, n] = [0, 0, 0];
	for (let i = 2; i < a.sample.t.length; i++) {
		// Two rows of running before: the first rows of a start still show the rest.
		if (!running(i) || !running(i - 1) || !running(i - 2) || !a.measure || !b.measure) continue;
		const d = toStored(b.sample.v[i] ?? NaN, b.measure) - toStored(a.sample.v[i] ?? NaN, a.measure);
		if (Number.isNaN(d)) continue;
		n++;
		if (d > -tolerance) yes++;
		if (d < -0.3) no++;
	}
	return n < 12 ? null : { yes: yes / n, no: no / n };
}

/**
 * Holds temperatures against each other while the compressor runs. Entering and leaving that are the wrong way round in
 * nearly every row are reported as swapped; other contradictions take from both columns' confidence.
 */
export function checkRelations(guesses: readonly Guess[], fileOf: (file: number) => string): Problem[] {
	const problems: Problem[] = [];
	for (const [cold, warm, tolerance] of COLDER) {
		for (const a of guesses.filter((g) => g.signal === cold)) {
			const b = guesses.find(
				(g) => g.signal === warm && g.sample.t === a.sample.t && sameOwner(a, { ...g, signal: a.signal })
			);
			const running = b ? runs(guesses, a) : null;
			if (!b || !running) continue;
			const share = colderShare(a, b, tolerance, running);
			if (!share || share.yes > 0.4) continue;
			const both = `"${a.sample.column}" and "${b.sample.column}"`;
			if (tolerance === 0.3 && share.no > 0.85) {
				problems.push(
					problem(
						a,
						fileOf(a.sample.file),
						'swapped-columns',
						`${both} look swapped: entering and leaving are the wrong way round while it runs.`
					)
				);
			}
			for (const g of [a, b]) {
				g.confidence *= 0.75;
				g.reasons.push(`${both} contradict each other while it runs`);
			}
		}
	}
	return problems;
}

/**
 * "Evaporator temperature" and "condenser temperature" may be the water's or the refrigerant's: one that is colder than
 * the leaving chilled water (warmer than the leaving condenser water) in nearly every running row is the refrigerant's.
 */
export function confirmSaturations(guesses: readonly Guess[]): void {
	for (const [signal, water] of [
		['evapSaturation', 'evapWaterOut'],
		['condSaturation', 'condWaterOut']
	] as const) {
		for (const guess of guesses.filter((g) => g.signal === signal && g.confidence > 0.5 && g.confidence < SURE)) {
			const witness = guesses.find(
				(g) => g.signal === water && g.unitId === guess.unitId && g.sample.t === guess.sample.t
			);
			const running = runs(guesses, guess);
			if (!witness || !running || witness.confidence < 0.6) continue;
			const [cold, warm] = signal === 'evapSaturation' ? [guess, witness] : [witness, guess];
			const share = colderShare(cold, warm, -0.3, running);
			if (!share || share.yes < 0.85) continue;
			guess.confidence = 0.86;
			guess.reasons.push(`while it runs, on the refrigerant's side of ${witness.sample.column}`);
		}
	}
}

/** Run status and motor current that contradict each other are neither of them sure. */
export function checkRunning(guesses: readonly Guess[]): void {
	for (const running of guesses.filter((g) => g.signal === 'running')) {
		for (const signal of ['motorCurrent', 'power', 'capacity', 'speed'] as const) {
			const load = guesses.find(
				(g) => g.signal === signal && sameOwner(running, { ...g, signal: 'running' }) && g.sample.t === running.sample.t
			);
			if (!load) continue;
			const pairs = pairedValues(running.sample, load.sample);
			const most = load.sample.shape.most;
			const on = pairs.filter(([r]) => r === 1);
			const off = pairs.filter(([r]) => r === 0);
			if (on.length < 4 || off.length < 4 || !(most > 0)) continue;
			const idle = on.filter(([, x]) => x < 0.05 * most).length / on.length;
			const loaded = off.filter(([, x]) => x > 0.3 * most).length / off.length;
			// A slide may stay where it was while the machine rests; current and power cannot.
			const parked = signal === 'capacity' || signal === 'speed';
			if (idle < 0.1 && loaded < 0.1 && running.confidence > 0.5) {
				running.confidence = Math.max(running.confidence, 0.88);
				running.reasons.push(`moves with ${load.sample.column}`);
			}
			if (on.length < 10 || off.length < 10 || (idle < 0.4 && (loaded < 0.4 || parked))) continue;
			load.confidence *= 0.75;
			if (idle > 0.6 && loaded > 0.6) running.confidence *= 0.75;
			load.reasons.push(`does not move with ${running.sample.column}`);
		}
	}
}
