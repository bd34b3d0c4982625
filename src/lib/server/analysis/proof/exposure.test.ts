import { expect, it } from 'vitest';
import { MONDAY, startRecord, trippedRecord } from '../../../../../fixtures/inference/start-record';
import { wordsFor } from '../wording/quantity-words';
import { conditionsOf, exposureOf, notExposed } from './exposure';

it('reaches 2 K beyond the failing starts (by hand) and names what is not logged', () => {
	const exposure = exposureOf(
		[20, 23].map((water) => trippedRecord(MONDAY, { figures: { condWaterInAtStart: water } })),
		conditionsOf(() => null)
	);
	expect(exposure.ranges[0]).toMatchObject({ low: 18, high: 25 });
	expect(exposure.leftOut).toEqual(['leaving water', 'water setpoint']);
	const at = (water: number) => startRecord(MONDAY, { figures: { condWaterInAtStart: water } });
	expect(notExposed(at(24.9), exposure, wordsFor('si'))).toBeNull();
	expect(notExposed(at(25.2), exposure, wordsFor('si'))).toContain('25.2 °C');
	expect(notExposed(startRecord(MONDAY, { firstStart: false }), exposure, wordsFor('si'))).toContain('short rest');
});
