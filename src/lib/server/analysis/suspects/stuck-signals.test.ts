import { expect, it } from 'vitest';
import { MINUTE, MONDAY, startRecord } from '../../../../../fixtures/inference/start-record';
import { stuckFinder } from './stuck-signals';
import { traceReader } from './trace-reader';

const start = startRecord(MONDAY);
const t = Float64Array.from({ length: 60 }, (_, i) => MONDAY - 20 * MINUTE + i * MINUTE);
const stuck = stuckFinder(
	traceReader({
		condWaterOut: { t, v: t.map((_, i) => 24.6 + (i % 2) * 0.05), logging: 'interval' },
		condSaturation: { t, v: t.map((at) => (at < MONDAY ? 18 : 27)), logging: 'interval' }
	})
);

it('calls a temperature stuck that goes through a start within its last steps (invented)', () => {
	expect(stuck('condWaterOut', start)).toBe(true);
	expect(stuck('condSaturation', start)).toBe(false);
});

it('does not judge short runs or signals that are not there', () => {
	expect(stuck('condWaterOut', startRecord(MONDAY + 1000, { endedAt: MONDAY + 5 * MINUTE }))).toBe(false);
	expect(stuck('oilTemp', start)).toBe(false);
});
