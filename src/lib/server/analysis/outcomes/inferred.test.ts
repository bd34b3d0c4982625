import { describe, expect, it } from 'vitest';
import { analyseCircuit } from '../analyse-circuit';
import { inventedInput, inventedLog, type Shape } from '../testing/synthetic-log';

// Invented: one run of ten minutes, from 3,600 s, with no alarm in the log.
const STOP = 4200;
const on = (since: number) => !Number.isNaN(since);

function outcome(shapes: { proof?: Shape; capacity?: Shape; water?: Shape }) {
	const series = inventedLog([{ start: 3600, stop: STOP }], 5, 0, 9000, {
		capacity: shapes.capacity ?? ((_, since) => (on(since) ? 70 : 0)),
		demand: (_, since) => (on(since) ? 100 : 0),
		evapWaterOut: shapes.water ?? (() => 12),
		waterSetpoint: () => 7,
		evapSaturation: () => 8,
		condSaturation: () => 35,
		...(shapes.proof ? { evapFlowProof: shapes.proof } : {})
	});
	const limits = { leavingWaterCutout: [{ value: 3, provenance: 'maker' as const, validFrom: -Infinity }] };
	const [start] = analyseCircuit(inventedInput(series, { limits, nature: { minCapacity: 25 } })).starts;
	return [start?.outcome, start?.trip?.kind];
}

describe('a flow proof that opens as the machine stops', () => {
	it('is a trip when it closes again by itself: the pump ran on', () => {
		expect(outcome({ proof: (t) => (t >= STOP && t < STOP + 15 ? 0 : 1) })).toEqual(['tripped', 'loss-of-water-flow']);
	});

	it('is none when it stays open: the pump was stopped', () => {
		expect(outcome({ proof: (t) => (t >= STOP ? 0 : 1) })[1]).toBeUndefined();
	});
});

describe('water under its setpoint with the capacity at its least', () => {
	const cooled: Shape = (_, since) => (on(since) ? 12 - (since / 600) * 9.2 : 12);

	it('is no trip, though the water passed its limit: it cannot be called either', () => {
		const capacity: Shape = (_, since) => (!on(since) ? 0 : since < 240 ? 60 : 25);
		expect(outcome({ capacity, water: cooled })).toEqual(['unclear', undefined]);
	});

	it('is one when it was still loaded', () => {
		expect(outcome({ water: cooled })).toEqual(['tripped', 'low-leaving-water']);
	});
});
