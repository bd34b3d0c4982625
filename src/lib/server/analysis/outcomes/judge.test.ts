import { describe, expect, it } from 'vitest';
import type { Run } from '../starts/runs';
import type { Activation } from './activations';
import type { StopEvidence } from './evidence';
import { judge, normalStop, type Case } from './judge';

const run = (seconds: number | null, end: Run['end'] = 'off', lastOn = (seconds ?? 0) - 5): Run => {
	const endedAt = seconds === null ? null : seconds * 1000;
	return {
		startedAt: 0,
		startUncertainty: 5,
		observed: true,
		endedAt,
		lastOn: lastOn * 1000,
		endUncertainty: 5,
		end,
		holes: [],
		restFrom: null,
		restAtLeast: false
	};
};
const nothing: StopEvidence = {
	commandFellAt: null,
	unloaded: false,
	valveClosed: false,
	setpointMet: false,
	waterAbove: true,
	loaded: true,
	allStopped: false
};
const alarm: Activation = {
	at: 301_000,
	text: 'Oil flow lost',
	kind: 'oil-flow',
	power: false,
	source: 'history',
	period: 0
};
const one = (more: Partial<Case> = {}): Case => {
	return {
		run: run(300),
		window: 1200,
		logTo: 5_000_000,
		alarm: null,
		evidence: nothing,
		inferred: null,
		onSchedule: false,
		pastLimit: false,
		pumpsStopped: null,
		...more
	};
};
const outcome = (more: Partial<Case>) => judge(one(more)).outcome;

describe('judge', () => {
	it('takes a recorded alarm for a trip, at the alarm’s time', () => {
		expect(judge(one({ alarm }))).toMatchObject({
			outcome: 'tripped',
			trip: { at: 301_000, basis: 'recorded', text: 'Oil flow lost', sureness: 1 }
		});
		expect(judge(one({ alarm })).reason).toContain('1 s after the stop');
	});

	it('never takes a power failure for one', () => {
		expect(outcome({ alarm: { ...alarm, power: true } })).toBe('lost');
		expect(outcome({ evidence: { ...nothing, allStopped: true } })).toBe('lost');
		expect(outcome({ evidence: { ...nothing, allStopped: true }, alarm: { ...alarm, kind: 'phase-or-supply' } })).toBe(
			'lost'
		);
		// A protective alarm of its own kind stands, whatever else stopped; so does an unloading before the stop.
		expect(outcome({ evidence: { ...nothing, allStopped: true }, alarm })).toBe('tripped');
		expect(outcome({ evidence: { ...nothing, allStopped: true, unloaded: true } })).toBe('called-off');
		expect(outcome({ pumpsStopped: true, evidence: { ...nothing, commandFellAt: 300_000 } })).toBe('lost');
		expect(outcome({ pumpsStopped: true, evidence: { ...nothing, commandFellAt: 290_000 } })).toBe('called-off');
	});

	it('holds what outlived the window, whatever hides its end', () => {
		expect(outcome({ run: run(1200) })).toBe('held');
		expect(outcome({ run: run(1195) })).toBe('unclear');
		expect(outcome({ run: run(null, 'log-end') })).toBe('held');
		expect(outcome({ run: run(null, 'log-end'), logTo: 600_000 })).toBe('lost');
		expect(outcome({ run: run(9000, 'gap-off', 1300), evidence: null })).toBe('held');
		expect(outcome({ run: run(9000, 'gap-off', 600), evidence: null })).toBe('lost');
	});

	it('calls off a normal stop inside the window, and says unclear where nothing tells', () => {
		for (const sign of [{ commandFellAt: 299_000 }, { unloaded: true }, { valveClosed: true }, { setpointMet: true }]) {
			expect(outcome({ evidence: { ...nothing, ...sign } })).toBe('called-off');
		}
		expect(outcome({ onSchedule: true })).toBe('called-off');
		expect(outcome({})).toBe('unclear');
		expect(outcome({ pastLimit: true, evidence: { ...nothing, unloaded: true } })).toBe('unclear');
		expect(normalStop({ evidence: null, onSchedule: true })).toBeNull();
	});
});
