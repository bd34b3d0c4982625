import { describe, expect, it } from 'vitest';
import { safetyWords, SAFETY_CLASSES } from './refrigerant-safety';
import { REFRIGERANTS } from './unit';

describe('safety classes', () => {
	it('are known for every refrigerant offered', () => {
		for (const refrigerant of REFRIGERANTS) expect(SAFETY_CLASSES[refrigerant]).toMatch(/^[AB](1|2L)$/);
	});

	it('say what flammable and toxic ones ask for (ASHRAE 34 classes, from memory)', () => {
		expect(safetyWords('R-1234ze(E)')).toContain('ignition sources');
		expect(safetyWords('R-123')).toContain('toxic');
		expect(safetyWords('R-134a')).not.toMatch(/toxic|ignition/);
	});
});
