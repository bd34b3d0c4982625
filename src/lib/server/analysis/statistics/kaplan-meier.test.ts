import { expect, it } from 'vitest';
import { WORKED_EXAMPLES } from '../../../../../fixtures/statistics/worked-examples';
import { kaplanMeier } from './kaplan-meier';

it.each(WORKED_EXAMPLES.kaplan_meier)('agrees with published curve %#', (example) => {
	const curve = kaplanMeier(example.times.map((time, i) => ({ time, event: example.event[i] === 1 })));
	expect(curve).toHaveLength(example.surv_at_sorted_unique_times.length);
	curve.forEach((step, i) => expect(step.survival).toBeCloseTo(example.surv_at_sorted_unique_times[i] ?? NaN, 2.9));
});

it('refuses a negative time', () => {
	expect(() => kaplanMeier([{ time: -1, event: true }])).toThrow(RangeError);
});
