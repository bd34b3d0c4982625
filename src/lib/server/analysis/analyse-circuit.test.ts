import { describe, expect, it } from 'vitest';
import type { CircuitInput } from '$lib/model/circuit-input';
import type { EventRecord, SeriesMap, TextSeries } from '$lib/model/series';
import { DEFAULT_LIMITS } from '$lib/model/unit';
import { analyseCircuit } from './analyse-circuit';
import { inventedInput, inventedLog, MIDNIGHT, type Shape } from './testing/synthetic-log';

// Invented logs; every expected value is worked by hand from the shapes below.
const HOUR = 3600;
const at = (seconds: number) => MIDNIGHT + seconds * 1000;

/** A restart at 10 h that trips 90 s in, one at 10.5 h that runs 3 h and stops on command. */
const runs = [
	{ start: 10 * HOUR, stop: 10 * HOUR + 90 },
	{ start: 10.5 * HOUR, stop: 13.5 * HOUR }
];
const trips = (t: number) => t < 10.25 * HOUR;
const capacity: Shape = (t, s) => {
	if (Number.isNaN(s)) return 0;
	if (trips(t)) return 60;
	const left = 13.5 * HOUR - t;
	return Math.min(45 + s * 0.1, 80, left < 60 ? 20 + left : 80);
};
const evapSaturation: Shape = (t, s) => {
	if (Number.isNaN(s)) return 12;
	return trips(t) ? 12 - s * 0.15 : Math.max(5, 12 - s * 0.05);
};
const condSaturation: Shape = (_, s) => (Number.isNaN(s) ? 20 : Math.min(35, 20 + s * 0.1));
const shapes = {
	capacity,
	evapSaturation,
	condSaturation,
	evapWaterOut: (t: number, s: number) => (Number.isNaN(s) ? 13 : Math.max(8, 13 - s / 300)),
	waterSetpoint: () => 6,
	oilTemp: (_: number, s: number) => (Number.isNaN(s) ? 40 : 45),
	startCommand: (t: number) => (t >= 10 * HOUR && t < 13.5 * HOUR ? 1 : 0)
};

function log(spacing: number, more: Partial<CircuitInput> = {}, change: (map: SeriesMap) => void = () => {}) {
	const series = inventedLog(runs, spacing, 0, 15 * HOUR, shapes);
	change(series);
	return analyseCircuit(inventedInput(series, more));
}

let unitMode: TextSeries = { t: new Float64Array(), text: [] };

const trip: EventRecord = {
	at: at(10 * HOUR + 91),
	text: 'Low evap temp cutout',
	severity: 'trip',
	what: 'activation',
	source: 'history'
};

describe('analyseCircuit on a 5 s log', () => {
	const { starts, smallestEventSeconds, covered } = log(5, { events: [trip] });
	const [first, second] = starts;

	it('finds both starts with their times', () => {
		expect(starts.map((s) => s.startedAt)).toEqual([at(10 * HOUR), at(10.5 * HOUR)]);
		expect(starts.map((s) => s.endedAt)).toEqual([at(10 * HOUR + 90), at(13.5 * HOUR)]);
		expect(first?.uncertaintySeconds).toBe(5);
		expect(smallestEventSeconds).toBe(5);
		expect(covered).toEqual([{ from: at(0), to: at(15 * HOUR) }]);
	});

	it('tells the trip from the held start', () => {
		expect(first?.outcome).toBe('tripped');
		expect(first?.startupTrip).toBe(true);
		expect(first?.trip).toMatchObject({ at: trip.at, kind: 'low-evaporator-saturation', basis: 'recorded' });
		expect(second?.outcome).toBe('held');
		expect(second?.trip).toBeNull();
	});

	it('knows rests, first starts and episodes', () => {
		expect(first?.restSeconds).toBe(10 * HOUR);
		expect(first?.restAtLeast).toBe(true);
		expect(first?.firstStart).toBe(true);
		expect(second?.restSeconds).toBe(0.5 * HOUR - 90);
		expect(second?.restAtLeast).toBe(false);
		expect(second?.firstStart).toBe(false);
		expect(starts.map((s) => [s.episode, s.tryNumber])).toEqual([
			[at(10 * HOUR), 1],
			[at(10 * HOUR), 2]
		]);
	});

	it('labels a restart after a trip', () => {
		expect(second?.notes).toContain('Restarted 29 min after a trip.');
	});

	it('reads the figures of the tripped start', () => {
		const f = first?.figures;
		expect(f?.startCapacity).toBe(60);
		expect(first?.marks.startCapacity).toBe('early');
		// Last running sample at 85 s: 12 − 85·0.15.
		expect(f?.minEvapSaturation).toBeCloseTo(-0.75, 9);
		expect(f?.minEvapSaturationAtSeconds).toBe(85);
		// 0.15 K/s is 9 K/min, falling.
		expect(f?.steepestFall).toBeCloseTo(-9, 9);
		// At 60 s: condensing 26, evaporating 3.
		expect(f?.liftAtStart).toBeCloseTo(23, 9);
		expect(f?.waterOutAtStart).toBe(13);
		expect(f?.oilLiftAtStart).toBe(28);
		// 10 s to the stop in a run under 90 s; this one is 90 s, so from 60 s: oil 45, condensing 26 to 28.5.
		expect(f?.minMargin).toBeCloseTo(45 - 28.5, 9);
		expect(f?.maxMargin).toBeCloseTo(19, 9);
		expect(f?.settledMargin).toBeNull();
		expect(first?.absent.settledMargin?.reason).toBe('run-too-short');
		expect(first?.absent.superheat?.reason).toBe('signal-missing');
		expect(first?.absent.secondsBelowCutout?.reason).toBe('no-limit');
	});

	it('reads the figures of the held start', () => {
		const f = second?.figures;
		// Median of 45…120 s by 5 s of 45 + 0.1·s.
		expect(f?.startCapacity).toBeCloseTo(45 + 8.25, 9);
		expect(f?.peakCapacity).toBe(80);
		expect(f?.timeToPeakSeconds).toBe(350);
		expect(f?.timeTo50Seconds).toBe(50);
		expect(f?.timeTo75Seconds).toBe(300);
		expect(f?.timeTo90Seconds).toBeNull();
		expect(second?.absent.timeTo90Seconds?.reason).toBe('does-not-apply');
		// 13 − s/300 is 0.2 K/min.
		expect(f?.pullDownRate).toBeCloseTo(-0.2, 6);
		expect(f?.settledMargin).toBeCloseTo(10, 9);
		expect(f?.evapApproach).toBeCloseTo(3, 9);
		expect(f?.settledCapacity).toBe(80);
		expect(second?.absent.oilLiftAtStart?.reason).toBe('does-not-apply');
		expect(f?.maxCondSaturation).toBe(35);
	});
});

describe('limits and the cut-out', () => {
	const limits = {
		...DEFAULT_LIMITS,
		evapSaturationCutout: [{ value: 0, provenance: 'given' as const, validFrom: -Infinity }]
	};

	it('measures the time below and infers the trip where nothing is recorded', () => {
		const { starts } = log(5, { limits });
		const first = starts[0];
		expect(first?.outcome).toBe('tripped');
		expect(first?.trip).toMatchObject({ kind: 'low-evaporator-saturation', basis: 'inferred', at: at(10 * HOUR + 90) });
		// Under 0 °C from 80 s on, last read at 85 s: 5 s, and a triangle of 5 s × 0.75 K.
		expect(first?.figures.secondsBelowCutout).toBeCloseTo(5, 9);
		expect(first?.figures.degreeSecondsBelowCutout).toBeCloseTo(1.875, 9);
		expect(first?.absent.recoverySeconds?.reason).toBe('does-not-apply');
		// Least −0.75 K under the limit, less 0.15 K/s × 5 s.
		expect(first?.figures['headroom.evapSaturation']).toBeCloseTo(-1.5, 9);
		expect(starts[1]?.figures.secondsBelowCutout).toBe(0);
		// The held one: falling to 5 °C by 0.05 K/s until 140 s, then flat: the first least reading was still falling.
		expect(starts[1]?.figures['headroom.evapSaturation']).toBeCloseTo(4.75, 9);
	});

	it('says too coarse at 60 s instead of guessing', () => {
		const { starts } = log(60, { limits });
		expect(starts[0]?.absent.secondsBelowCutout?.reason).toBe('too-coarse');
		expect(starts[0]?.absent.steepestFall?.reason).toBe('too-coarse');
		expect(starts[0]?.uncertaintySeconds).toBe(60);
		expect(starts[0]?.figures.startCapacity).toBe(60);
		expect(starts[0]?.marks.startCapacity).toBe('coarse');
	});

	it('does not infer a trip where the command fell, nor without a protective quantity', () => {
		const stopped = log(5, { limits }, (map) => {
			const command = map.startCommand;
			if (command === undefined) return;
			map.startCommand = {
				...command,
				v: command.t.map((t) => (t >= at(10 * HOUR) && t < at(10 * HOUR + 85) ? 1 : 0))
			};
		});
		expect(stopped.starts[0]?.outcome).toBe('called-off');
		const blind = log(5, { limits }, (map) => delete map.evapSaturation);
		expect(blind.starts[0]?.outcome).toBe('unclear');
	});
});

describe('alarms without an alarm column', () => {
	it('are read from a mode column that names them', () => {
		const { starts } = log(5, {}, (map) => {
			const t = map.running?.t ?? new Float64Array();
			unitMode = {
				t,
				text: Array.from(t, (x) => (x >= at(10 * HOUR + 90) && x < at(10.4 * HOUR) ? 'Fault shutdown' : 'Auto'))
			};
		});
		expect(starts[0]?.trip?.basis).toBe('inferred');
		const read = log(5, { texts: { unitMode } }).starts;
		expect(read[0]?.trip).toMatchObject({ kind: 'unknown', basis: 'recorded', text: 'Fault shutdown' });
		expect(read[1]?.outcome).toBe('held');
	});
});

describe('a flow alarm after a normal stop', () => {
	it('is the pump that stops, not a trip', () => {
		const flow = { ...trip, at: at(13.5 * HOUR + 60), text: 'Evaporator water flow lost' };
		const early = log(5, { events: [flow] }, (map) => {
			const command = map.startCommand;
			if (command !== undefined) {
				map.startCommand = {
					...command,
					v: command.t.map((t) => (t >= at(10 * HOUR) && t < at(13.5 * HOUR - 30) ? 1 : 0))
				};
			}
		});
		expect(early.starts[1]).toMatchObject({ outcome: 'held', trip: null });
		// At the stop itself it is a trip.
		const during = log(5, { events: [{ ...flow, at: at(13.5 * HOUR) }] });
		expect(during.starts[1]?.outcome).toBe('tripped');
	});
});

describe('what is no start', () => {
	it('does not take the first running row, a blank or a gap for one', () => {
		const series = inventedLog([{ start: -10, stop: 3 * HOUR }], 5, 0, 4 * HOUR, { capacity: () => 70 });
		const running = series.running;
		if (running === undefined) throw new Error('no running');
		const v = running.v.map((x, i) => (i % 100 === 50 ? NaN : x));
		expect(analyseCircuit(inventedInput({ ...series, running: { ...running, v } })).starts).toEqual([]);
	});

	it('keeps a run with a hole whole, and bridges an off under 20 s', () => {
		const series = inventedLog([{ start: HOUR, stop: 3 * HOUR }], 5, 0, 4 * HOUR);
		const running = series.running;
		if (running === undefined) throw new Error('no running');
		const v = running.v.map((x, i) => {
			const s = i * 5;
			if (s > 1.5 * HOUR && s < 1.6 * HOUR) return NaN;
			return s >= 2 * HOUR && s < 2 * HOUR + 15 ? 0 : x;
		});
		const { starts, covered } = analyseCircuit(inventedInput({ running: { ...running, v } }));
		expect(starts).toHaveLength(1);
		expect(starts[0]?.holes).toEqual([{ from: at(1.5 * HOUR), to: at(1.6 * HOUR) }]);
		expect(starts[0]?.endedAt).toBe(at(3 * HOUR));
		expect(covered).toHaveLength(2);
	});

	it('loses a run whose start counter moved in a gap', () => {
		const series = inventedLog([{ start: HOUR, stop: 3 * HOUR }], 5, 0, 4 * HOUR, {
			startsCounter: (t) => (t < HOUR ? 10 : t < 1.2 * HOUR ? 11 : 12)
		});
		const running = series.running;
		if (running === undefined) throw new Error('no running');
		const v = running.v.map((x, i) => (i * 5 > 1.1 * HOUR && i * 5 < 1.3 * HOUR ? NaN : x));
		const { starts } = analyseCircuit(inventedInput({ ...series, running: { ...running, v } }));
		expect(starts.map((s) => [s.outcome, s.endedAt])).toEqual([['lost', at(1.1 * HOUR)]]);
	});
});

describe('corrections and visits', () => {
	it('keeps a correction through recomputation and says so', () => {
		const { starts } = log(5, {
			events: [trip],
			visits: [{ from: at(10.4 * HOUR), to: at(11 * HOUR) }],
			corrections: [{ circuit: '1', startedAt: at(10 * HOUR + 30), outcome: 'called-off', reason: 'stopped by hand' }]
		});
		expect(starts[0]?.outcome).toBe('called-off');
		expect(starts[0]?.trip).toBeNull();
		expect(starts[0]?.outcomeReason).toContain('stopped by hand');
		expect(starts.map((s) => s.attended)).toEqual([false, true]);
	});
});
