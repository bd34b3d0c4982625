import type { CircuitInput } from '$lib/model/circuit-input';
import type { StartRecord } from '$lib/model/start';
import { prepareCircuit, type Circuit } from '../circuit';
import { median } from '../series/numbers';
import { readRunning } from '../starts/running';
import { readOffsets } from './offsets';
import { judgeEqualising, readEqualising, readOilDecay, readOilLift } from './oil';
import {
	REST_TESTS,
	type NightRest,
	type NightsResult,
	type NightTest,
	type RestReading,
	type RestTestKey
} from './types';

/** Rests shorter than this are no test of anything, ms. */
const LEAST = 1_800_000;
/** Three rests at least for a resting offset (method.md). */
const LEAST_RESTS = 3;

/**
 * The night read as a test: what every rest of half an hour or more, from a stop to the next start, says of heater,
 * valves, sensors and non-condensables, and what all of them say together. Rests oldest first. Each test passes, fails,
 * is shown without a verdict, or says why it cannot be made. A rest that a gap touches is left out.
 */
export function nightsOf(input: CircuitInput, starts: readonly StartRecord[]): NightsResult {
	const running = readRunning(input.series, input.nature);
	const circuit = running === null ? null : prepareCircuit(input, running, () => false);
	const rests = circuit === null ? [] : restsOf(circuit, starts);
	judgeEqualising(rests.flatMap((rest) => rest.results.filter((r) => r.key === 'equalising')));
	const keys = Object.keys(REST_TESTS) as RestTestKey[];
	return { rests, tests: keys.map((key) => sumUp(key, rests)) };
}

function restsOf(circuit: Circuit, starts: readonly StartRecord[]): NightRest[] {
	const rests: NightRest[] = [];
	circuit.runs.forEach((run, i) => {
		if (run.end !== 'off' || run.endedAt === null) return;
		const next = circuit.runs[i + 1];
		if (next !== undefined && (!next.observed || next.restAtLeast)) return;
		const rest = { from: run.endedAt, to: next?.startedAt ?? circuit.logTo };
		if (rest.to - rest.from < LEAST) return;
		const startAt = next === undefined ? null : startNear(starts, next.startedAt);
		const results = [
			readOilDecay(circuit, rest),
			readEqualising(circuit, rest),
			...readOffsets(circuit, rest),
			readOilLift(circuit, rest)
		];
		rests.push({ ...rest, startAt, results });
	});
	return rests;
}

/** The start's own instant, which a person may have corrected. */
function startNear(starts: readonly StartRecord[], at: number): number {
	return starts.find((start) => Math.abs(start.startedAt - at) <= 120_000)?.startedAt ?? at;
}

/** All rests of one test: the verdict of most of the testable ones, of three at least; newest 14 nights at most. */
function sumUp(key: RestTestKey, rests: readonly NightRest[]): NightTest {
	const readings = rests.flatMap((rest) => rest.results.filter((r) => r.key === key));
	const judged = readings.filter((r) => r.result === 'passed' || r.result === 'failed').slice(-14);
	const shown = readings.filter((r) => r.value !== null).slice(-14);
	const quantity = readings[0]?.quantity ?? 'temperatureDifference';
	const label = REST_TESTS[key];
	const base = { key, label, quantity };
	const value = (list: readonly RestReading[]) => median(list.flatMap((r) => (r.value === null ? [] : [r.value])));
	if (judged.length >= LEAST_RESTS) {
		const failed = judged.filter((r) => r.result === 'failed');
		const result = failed.length * 2 > judged.length ? ('failed' as const) : ('passed' as const);
		const sentence = `${failed.length} of ${judged.length} rests failed.`;
		return { ...base, result, sentence, value: value(judged), rests: judged.length };
	}
	if (shown.length > 0) {
		const result = judged.length > 0 ? ('not-testable' as const) : ('shown' as const);
		const sentence = `${shown.length} ${shown.length === 1 ? 'rest shows' : 'rests show'} a figure; ${LEAST_RESTS} with a verdict are needed.`;
		return { ...base, result, sentence, value: value(shown), rests: shown.length };
	}
	const why = readings.at(-1)?.why ?? 'The log holds no rest of half an hour without a gap.';
	return { ...base, result: 'not-testable', sentence: why, value: null, rests: 0 };
}

/** A resting offset between two sensors over all rests of a log, K. */
export type RestingOffset = {
	key: RestTestKey;
	label: string;
	value: number;
	rests: number;
	result: NightTest['result'];
};

/** The resting offsets that at least three rests show (entering, saturation, suction, condensing). */
export function restingOffsets(nights: NightsResult): RestingOffset[] {
	return nights.tests.flatMap(({ key, label, value, rests, result }) => {
		const isOffset = key.endsWith('-offset') || key === 'non-condensables';
		return isOffset && value !== null && rests >= LEAST_RESTS ? [{ key, label, value, rests, result }] : [];
	});
}
