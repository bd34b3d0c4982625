import { expect, it } from 'vitest';
import type { SeriesId, SignalKey } from '$lib/model/signals';
import { evaluateSuspects } from '../suspects';
import { inventedWeek, type Picture } from '../suspects/testing/invented-week';
import { tonightsLog } from './tonights-log';

const starved: Partial<Picture> = {
	tripAfter: (day, morning) => ((2 * day + (morning ? 0 : 1)) % 3 === 0 ? 80 : null),
	superheat: (since, trips) => (trips ? 3 + since / 8 : 2.5),
	dischargeSuperheat: (since, trips) => (trips ? 8 + since / 4 : 12)
};

function advice(change: Partial<Picture>, options: { spacing?: number; without?: readonly SeriesId[] }) {
	const evidence = inventedWeek(change, options);
	return tonightsLog({
		suspects: evaluateSuspects(evidence),
		nature: evidence.input.nature,
		starts: evidence.starts,
		logged: new Set(Object.keys(evidence.input.series) as SignalKey[])
	});
}

it('asks for the signals that the leading suspects lack, at start spacing', () => {
	const log = advice(starved, {
		spacing: 15,
		without: ['suctionTemp', 'dischargeTemp', 'valvePosition', 'liquidTemp']
	});
	const suction = log?.points.find((point) => point.signal === 'suctionTemp');
	expect(suction).toMatchObject({ spacingSeconds: 5, when: 'for 15 min after each start' });
	expect(suction?.why).toContain('not logged yet');
	expect(log?.separates).toHaveLength(2);
	expect(log?.sentence).toContain('apart');
});

it('asks for finer rows when the spacing is too coarse', () => {
	const log = advice(starved, { spacing: 40 });
	expect(log?.points.some((point) => point.why.includes('logged every 40 s'))).toBe(true);
});

it('asks for nothing on a sound unit', () => {
	expect(advice({}, { spacing: 15 })).toBeNull();
});
