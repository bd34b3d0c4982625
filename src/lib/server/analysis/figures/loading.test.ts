import { describe, expect, it } from 'vitest';
import { inventedContext } from '../testing/context';
import type { Shape } from '../testing/synthetic-log';
import { readPeak, readStartLoading } from './loading';
import { emptyFigures } from './sheet';

// Capacity is 40 + s/10 from the start on: every value below is worked by hand from that.
const capacity: Shape = (_, s) => (Number.isNaN(s) ? 0 : Math.min(40 + s / 10, 100));
const motorCurrent: Shape = (_, s) => (Number.isNaN(s) ? 0 : s < 12 ? 400 : Math.min(100 + s, 300));

function read(seconds: number, spacing: number, transition: number | null = null) {
	const sheet = emptyFigures();
	const context = inventedContext(
		seconds,
		spacing,
		{ capacity, motorCurrent },
		{ nature: { starterTransition: transition } }
	);
	readStartLoading(context, sheet);
	readPeak(context, sheet);
	return sheet;
}

describe('startCapacity', () => {
	it('is the median of 45–120 s, both inclusive', () => {
		expect(read(3600, 5).figures.startCapacity).toBeCloseTo(48.25, 9);
		expect(read(3600, 5).marks.startCapacity).toBeUndefined();
		// Rows at 60 and 120 s.
		expect(read(3600, 60).figures.startCapacity).toBeCloseTo(49, 9);
	});

	it('is read from 10 s to the stop in a shorter run, marked early', () => {
		// Rows at 10…85 s by 5: the middle is 47.5 s.
		expect(read(90, 5).figures.startCapacity).toBeCloseTo(44.75, 9);
		expect(read(90, 5).marks.startCapacity).toBe('early');
		expect(read(10, 5).absent.startCapacity?.reason).toBe('run-too-short');
	});

	it('is the first row where the spacing is coarse, marked so', () => {
		expect(read(3600, 300).figures.startCapacity).toBeCloseTo(40, 9);
		expect(read(3600, 300).marks.startCapacity).toBe('coarse');
		expect(read(80, 60).marks.startCapacity).toBe('coarse');
		// Rows at 0 and 40 s, the first off row at 80 s: the one at 40 s is early; a run of one row has only that.
		expect(read(70, 40).figures.startCapacity).toBeCloseTo(44, 9);
		expect(read(70, 40).marks.startCapacity).toBe('early');
		expect(read(55, 60).marks.startCapacity).toBe('coarse');
	});

	it('says what is missing', () => {
		const sheet = emptyFigures();
		readStartLoading(inventedContext(600, 5, {}), sheet);
		expect(sheet.absent.startCapacity).toEqual({ reason: 'signal-missing', detail: 'The log has no capacity.' });
	});
});

describe('startAmps', () => {
	it('does not count before the starter’s transition + 10 s, or 45 s', () => {
		// Early run of 90 s: from 45 s when unknown (45…85, middle 65), from 20 s when the transition is at 10 s (20…85).
		expect(read(90, 5).figures.startAmps).toBeCloseTo(165, 9);
		expect(read(90, 5, 10).figures.startAmps).toBeCloseTo(152.5, 9);
		expect(read(40, 5).absent.startAmps?.reason).toBe('run-too-short');
	});
});

describe('peakCapacity and the times to load', () => {
	it('take the first time each level is reached, up to 30 s before the stop', () => {
		const { figures } = read(400, 5);
		expect(figures.peakCapacity).toBeCloseTo(77, 9);
		expect(figures.timeToPeakSeconds).toBe(370);
		expect(figures.timeTo50Seconds).toBe(100);
		expect(figures.timeTo75Seconds).toBe(350);
	});

	it('say when a level was not reached, and when the run was too short', () => {
		expect(read(400, 5).absent.timeTo90Seconds?.reason).toBe('does-not-apply');
		expect(read(25, 5).absent.peakCapacity?.reason).toBe('run-too-short');
	});
});
