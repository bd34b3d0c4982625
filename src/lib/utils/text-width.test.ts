import { describe, expect, it } from 'vitest';
import { textWidth } from './text-width';

describe('textWidth without a canvas', () => {
	it('grows with the text and its size, mono by 0.6 em a letter', () => {
		expect(textWidth('28.0', 10, 'figures')).toBeCloseTo(24, 9);
		expect(textWidth('lift', 12)).toBeLessThan(textWidth('leaving water', 12));
		expect(textWidth('lift', 24)).toBeCloseTo(2 * textWidth('lift', 12), 9);
	});
});
